'use strict';
// Where the server is: the setting, then the program that came with the
// extension, then the PATH.

const fs = require('fs');
const path = require('path');

const program = process.platform === 'win32' ? 'kern.exe' : 'kern';

function runs(file) {
  try {
    fs.accessSync(file, fs.constants.X_OK);
    return fs.statSync(file).isFile();
  } catch {
    return false;
  }
}

/**
 * find gives { command, from } or { problem }, a sentence for the user.
 * @param {string} setting the value of kern.server.path
 * @param {string} extension the folder of the extension
 * @param {string} searched the PATH
 */
function find(setting, extension, searched) {
  if (setting) {
    if (runs(setting)) return { command: setting, from: 'the setting kern.server.path' };
    return { problem: `The setting kern.server.path names '${setting}', which is not a program that can be run.` };
  }
  const bundled = path.join(extension, 'bin', program);
  if (runs(bundled)) return { command: bundled, from: 'the extension' };
  for (const dir of (searched || '').split(path.delimiter)) {
    if (path.isAbsolute(dir) && runs(path.join(dir, program))) return { command: path.join(dir, program), from: 'the PATH' };
  }
  return {
    problem: `There is no program '${program}': none came with this extension and none is on the PATH. ` +
      'Install kern, or name the program in the setting kern.server.path.',
  };
}

module.exports = { find };
