'use strict';
// One line per step, so that whoever waits knows what for and how long it took.
// Plain CommonJS: it is used before any package is installed, and by the TypeScript drivers later.

function seconds(since) {
  return ((performance.now() - since) / 1000).toFixed(1) + ' s';
}

/** A failure whose message is for the person at the keyboard: what went wrong and what to do. */
class Advice extends Error {
  constructor(message, todo) {
    super(todo ? `${message}\n\n${todo}` : message);
    this.name = 'Advice';
  }
}

function createProgress(write = (text) => process.stdout.write(text)) {
  return {
    say: (text) => write(`${text}\n`),
    async step(title, work) {
      const start = performance.now();
      write(`  ${title} ... `);
      try {
        const result = await work();
        write(`done (${seconds(start)})\n`);
        return result;
      } catch (error) {
        write('failed\n');
        throw error;
      }
    },
  };
}

const progress = createProgress();

/** Ends a driver: an Advice is printed as it is, anything else with its stack, since it is a defect. */
function reportAndExit(error) {
  const text = error instanceof Advice ? error.message : (error && error.stack) || String(error);
  process.stderr.write(`\n${text}\n`);
  process.exit(1);
}

module.exports = { Advice, createProgress, progress, reportAndExit };
