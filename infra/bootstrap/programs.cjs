'use strict';
// Where the programs live that npm cannot bring: PostgreSQL's server and a Chromium for the tests.

const { accessSync, constants, existsSync, readdirSync } = require('node:fs');
const path = require('node:path');

function isExecutable(file) {
  try {
    accessSync(file, constants.X_OK);
    return true;
  } catch {
    return false;
  }
}

function onPath(name) {
  const folders = (process.env.PATH ?? '').split(path.delimiter).filter(Boolean);
  return folders.map((folder) => path.join(folder, name)).find(isExecutable);
}

const debianPostgres = '/usr/lib/postgresql';

/** The folder with `postgres` and `initdb`, newest version first; undefined when there is none. */
function findPostgres() {
  const versions = existsSync(debianPostgres) ? readdirSync(debianPostgres) : [];
  const folders = versions
    .filter((version) => Number(version) >= 14)
    .sort((a, b) => Number(b) - Number(a))
    .map((version) => path.join(debianPostgres, version, 'bin'));
  const inPath = onPath('postgres');
  if (inPath) folders.push(path.dirname(inPath));
  return folders.find((folder) =>
    ['postgres', 'initdb'].every((name) => isExecutable(path.join(folder, name))),
  );
}

function findChromium() {
  const asked = process.env.CHROME_PATH;
  if (asked && isExecutable(asked)) return asked;
  return ['chromium', 'chromium-browser', 'google-chrome'].map(onPath).find(Boolean);
}

module.exports = { findChromium, findPostgres };
