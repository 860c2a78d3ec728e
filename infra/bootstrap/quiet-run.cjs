'use strict';
// Runs a program without its chatter; when it fails, its last lines are what one needs to see.

const { spawn } = require('node:child_process');
const { Advice } = require('./progress.cjs');

/** The end of the output; of a long one, rather where it begins to speak of an error. */
function tail(text, most = 40) {
  const lines = text.trimEnd().split('\n');
  const first = lines.findIndex((line) => /\berror\b/i.test(line));
  const from = Math.max(0, lines.length - most);
  return first >= 0 && first < from
    ? [...lines.slice(first, first + most), '...'].join('\n')
    : lines.slice(from).join('\n');
}

const running = new Set();

// Whoever is told to end by a signal alone (a service manager, CI) takes a build or an installation
// along; at a terminal they hear of Ctrl-C themselves.
process.on('exit', () => {
  for (const child of running) child.kill('SIGTERM');
});

function quietRun(command, args, { todo, ...options } = {}) {
  return new Promise((resolve, reject) => {
    const child = spawn(command, args, { stdio: ['ignore', 'pipe', 'pipe'], ...options });
    running.add(child);
    let output = '';
    const collect = (chunk) => {
      output = (output + chunk).slice(-200_000);
    };
    child.stdout.on('data', collect);
    child.stderr.on('data', collect);
    child.on('error', (error) => reject(new Advice(`${command}: ${error.message}`, todo)));
    child.on('exit', () => running.delete(child));
    child.on('close', (code, signal) => {
      if (code === 0) return resolve(output);
      const how = signal ? `was ended by ${signal}` : `ended with code ${code}`;
      reject(new Advice(`${[command, ...args].join(' ')} ${how}:\n${tail(output)}`, todo));
    });
  });
}

module.exports = { quietRun };
