'use strict';

const assert = require('node:assert/strict');
const fs = require('node:fs');
const os = require('node:os');
const path = require('node:path');
const { test } = require('node:test');
const { find } = require('../src/server');

const name = process.platform === 'win32' ? 'kern.exe' : 'kern';

/** house makes a folder with a program in each of the places named. */
function house(t, ...places) {
  const root = fs.mkdtempSync(path.join(os.tmpdir(), 'kern-find-'));
  t.after(() => fs.rmSync(root, { recursive: true }));
  for (const place of places) {
    fs.mkdirSync(path.join(root, place), { recursive: true });
    fs.writeFileSync(path.join(root, place, name), '', { mode: 0o755 });
  }
  return (...parts) => path.join(root, ...parts);
}

test('the setting comes first', (t) => {
  const at = house(t, 'own', 'extension/bin', 'path');
  assert.deepEqual(find(at('own', name), at('extension'), at('path')), { command: at('own', name), from: 'the setting kern.server.path' });
});

test('then the program of the extension', (t) => {
  const at = house(t, 'extension/bin', 'path');
  assert.deepEqual(find('', at('extension'), at('path')), { command: at('extension', 'bin', name), from: 'the extension' });
});

test('then the PATH, in order, absolute folders alone', (t) => {
  const at = house(t, 'first', 'second');
  const searched = ['.', at('nothing'), at('first'), at('second')].join(path.delimiter);
  assert.deepEqual(find('', at('extension'), searched), { command: at('first', name), from: 'the PATH' });
});

test('a setting that names no program is a problem, whatever else there is', (t) => {
  const at = house(t, 'extension/bin', 'path');
  assert.match(find(at('missing'), at('extension'), at('path')).problem, /kern\.server\.path names '.*missing', which is not a program/);
  assert.match(find(at('path'), at('extension'), at('path')).problem, /which is not a program/, 'a folder');
});

test('no program anywhere is a problem that says what to do', (t) => {
  const at = house(t, 'empty/other');
  for (const searched of ['', undefined, at('empty')]) {
    assert.match(find('', at('extension'), searched).problem, /none came with this extension and none is on the PATH.*kern\.server\.path/);
  }
});

test('a file that cannot be run is no program', { skip: process.platform === 'win32' }, (t) => {
  const at = house(t, 'extension/bin', 'path');
  fs.chmodSync(at('extension', 'bin', name), 0o644);
  assert.equal(find('', at('extension'), at('path')).from, 'the PATH');
});
