'use strict';
// Runs a program without its chatter; when it fails, its last lines are what one needs to see.

const { spawn } = require('node:child_process');
const { Advice } = require('./progress.cjs');

function tail(text, lines = 25) {
  return text.trimEnd().split('\n').slice(-lines).join('\n');
}

function quietRun(command, args, { todo, ...options } = {}) {
  return new Promise((resolve, reject) => {
    const child = spawn(command, args, { stdio: ['ignore', 'pipe', 'pipe'], ...options });
    let output = '';
    const collect = (chunk) => {
      output = (output + chunk).slice(-200_000);
    };
    child.stdout.on('data', collect);
    child.stderr.on('data', collect);
    child.on('error', (error) => reject(new Advice(`${command}: ${error.message}`, todo)));
    child.on('close', (code, signal) => {
      if (code === 0) return resolve(output);
      const how = signal ? `was ended by ${signal}` : `ended with code ${code}`;
      reject(new Advice(`${[command, ...args].join(' ')} ${how}:\n${tail(output)}`, todo));
    });
  });
}

module.exports = { quietRun };
