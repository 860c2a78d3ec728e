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

const refusedByDisk = {
  EACCES: 'Run the command as the user it belongs to, or give it to yourself (chown).',
  EPERM: 'Run the command as the user it belongs to, or give it to yourself (chown).',
  EROFS: 'The disk is mounted for reading only: work in a checkout elsewhere.',
  ENOSPC: 'The disk is full: make room, then run the command again.',
};

/** What a person needs to read: advice as it is; a defect of ours with its stack. */
function report(error) {
  if (error instanceof Advice) return error.message;
  const todo = error && error.path && refusedByDisk[error.code];
  if (todo) return `${error.path} cannot be written or read: ${error.message}\n\n${todo}`;
  return (error && error.stack) || String(error);
}

/** Ends a driver, saying why. */
function reportAndExit(error) {
  process.stderr.write(`\n${report(error)}\n`);
  process.exit(1);
}

module.exports = { Advice, createProgress, progress, report, reportAndExit };
