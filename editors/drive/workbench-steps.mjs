// Drives the VS Code workbench with the packaged extension:
//   node workbench-steps.mjs WORKBENCH PROJECT VSIX PICTURES
// PROJECT is a copy of testdata.
import assert from 'node:assert/strict';
import { Workbench } from './workbench.mjs';

const [dir, project, vsix, pictures] = process.argv.slice(2);
const gallery = 'boathouse/gallery.kern';
const canopy = 'slips/canopy.kern';
const blanks = (s) => s.replaceAll('\u00a0', ' ');

const steps = {
  async 'the extension colours words, names and units'(w) {
    await w.open('gallery.kern');
    const colour = async (text, part) => {
      const span = w.line(text).locator('span span', { hasText: part }).first();
      return span.evaluate((e) => getComputedStyle(e).color);
    };
    const parts = [['column P4', 'column'], ['column P4', 'P4'], ['column P4', '"Prop below'], ['load G 48', '48'], ['load G 48', 'load']];
    await w.until('colours', async () => {
      const plain = await w.editor.evaluate((e) => getComputedStyle(e).color);
      const others = await Promise.all(parts.map(([text, part]) => colour(text, part)));
      return plain && others.every((c) => c && c !== plain) && new Set(others).size >= 4;
    });
  },

  async 'the server comes from the extension and says so'(w) {
    await w.command('kern: Show Status');
    const toast = await w.there('.notification-list-item-message', 'Server: running');
    const text = await toast.innerText();
    assert.match(text, /Version: \d+\.\d+\.\d+/);
    assert.match(text, /bin\/kern, from the extension/);
    await w.command('Notifications: Clear All Notifications');
  },

  async 'failing members are underlined'(w) {
    await w.there('.squiggly-error');
    await w.command('View: Toggle Problems');
    const problem = await w.there('.markers-panel .monaco-list-row', 'P4 fails flexural-buckling-major');
    assert.match(await problem.innerText(), /kern\s*\(?flexural-buckling-major/);
    await w.picture('1-problems');
    await w.command('View: Toggle Problems');
    await w.picture('2-squiggles');
  },

  async 'a mended number clears its mark, and only its'(w) {
    await w.open('canopy.kern');
    const before = await w.until('five marks', async () => (await w.squiggles('error')) >= 5 && w.squiggles('error'));
    await w.cursor(canopy, '3,2 m', 1);
    await w.page.keyboard.press('Delete');
    await w.page.keyboard.type('.');
    await w.until('one mark less', async () => (await w.squiggles('error')) === before - 1);
    await w.page.keyboard.press('Escape');
    await w.save();
    assert.match(w.read(canopy), /height {3}= 3\.2 m\n {4}load G 4 t/);
    await w.picture('3-slips');
  },

  async 'a quick fix mends a unit, and is saved'(w) {
    const before = await w.squiggles('error');
    await w.cursor(canopy, 'Kn');
    await w.page.keyboard.press('Control+.');
    await w.there('.action-widget .monaco-list-row', 'Write kN');
    await w.picture('4-quick-fix');
    await w.page.keyboard.press('Enter');
    await w.until('one mark less', async () => (await w.squiggles('error')) === before - 1);
    await w.save();
    assert.match(w.read(canopy), /load S 25 kN\n/);
  },

  async 'completion knows the place'(w) {
    await w.cursor(canopy, 'column K3');
    await w.page.keyboard.press('End');
    await w.page.keyboard.press('Enter');
    await w.page.keyboard.type('hol');
    await w.page.keyboard.press('Control+Space');
    const row = await w.there('.suggest-widget.visible .monaco-list-row', 'hold');
    assert.equal(await w.page.locator('.suggest-widget.visible .monaco-list-row', { hasText: 'column' }).count(), 0);
    await w.details();
    await w.picture('5-completion');
    await row.click();
    await w.line('hold both at height / 2').waitFor();
    await w.page.keyboard.press('Escape');
    await w.page.keyboard.press('Escape');
    await w.page.keyboard.press('End');
    await w.page.keyboard.press('Enter');
    await w.page.keyboard.type('load G 3 k');
    await w.there('.suggest-widget.visible .monaco-list-row', 'kN');
    await w.picture('6-completion-units');
    await w.revert();
  },

  async 'the form of a statement is shown while it is typed'(w) {
    await w.cursor(canopy, 'load S 14 kN', 12);
    await w.page.keyboard.press('Enter');
    await w.page.keyboard.type('load G 3 kN across ');
    await w.there('.parameter-hints-widget.visible', 'across AXIS at PLACE');
    await w.picture('7-signature');
    await w.revert();
  },

  async 'formatting gives the one layout'(w) {
    await w.open('gallery.kern');
    const before = w.read(gallery);
    await w.cursor(gallery, 'load G 62 kN');
    await w.page.keyboard.type('   ');
    await w.command('Format Document');
    await w.until('the layout', async () => /^ {4}load G 62 kN$/.test(blanks(await w.line('load G 62').innerText())));
    await w.save();
    assert.equal(w.read(gallery), before);
  },

  async 'results stand at the ends of lines'(w) {
    await w.there('.view-line span[class*="dyn-rule"]', /fails\s1\.\d\d/);
    assert.match(blanks(await w.line('column P4').innerText()), /column P4 "Prop below the stair landing" as P1 \{.*fails 1\.\d\d flexural-buckling-m/);
    assert.match(blanks(await w.line('column P1').innerText()), /\{.*0\.\d\d flexural-buckling-m/);
    assert.match(blanks(await w.line('column P1').innerText()), /pinned both ends/);
    assert.match(blanks(await w.line('clear =').innerText()), /= 3300 mm/);
    await w.picture('8-hints');
  },

  async 'a lens leads to the working, which follows the text'(w) {
    await w.cursor(gallery, 'column P4');
    await w.until('the lens beside the verdict', async () => {
      // lenses are drawn anew while the text is checked: one that is gone has no box
      const verdict = await w.there('.codelens-decoration', /P4: fails 1\.\d\d/);
      const top = (await verdict.boundingBox())?.y;
      for (const l of await w.page.locator('.codelens-decoration a', { hasText: 'show working' }).all()) {
        const box = await l.boundingBox();
        if (top !== undefined && box && Math.abs(box.y - top) < 10) {
          await l.click();
          return true;
        }
      }
      return false;
    });
    await w.there('.tabs-container .tab', 'Preview P4.md');
    const shown = async () => (await Promise.all(w.page.frames().map((f) => f.evaluate(() => document.querySelector('.markdown-body')?.innerText ?? '').catch(() => '')))).join('');
    await w.until('the working', async () => /^P4: Prop below the stair landing\s+fails/.test(await shown()));
    assert.match(await shown(), /section: SHS 90x90x5/);
    await w.picture('9-working');
    await w.page.locator('.tab', { hasText: 'gallery.kern' }).click();
    await w.cursor(gallery, '96 kN'); // becomes 6 kN
    await w.page.keyboard.press('Delete');
    await w.until('the working to follow', async () => /^P4: Prop below the stair landing\s+passes/.test(await shown()));
    await w.revert();
    await w.until('the working to follow back', async () => /^P4: Prop below the stair landing\s+fails/.test(await shown()));
    await w.page.locator('.tab', { hasText: 'Preview P4.md' }).locator('.codicon-close').click();
    await w.page.locator('.tab', { hasText: 'Preview P4.md' }).waitFor({ state: 'detached' });
  },

  async 'a hover shows verdicts, derivations and drawings'(w) {
    await w.open('gallery.kern');
    await w.cursor(gallery, 'P4 "');
    await w.hover();
    const table = await w.there('.monaco-hover:not(.hidden) .hover-row table', 'flexural-buckling-major');
    assert.match(await table.innerText(), /1\.18/);
    await w.picture('10-hover-member');
    await w.page.keyboard.press('Escape');
    await w.cursor(gallery, '= prop', 3);
    await w.hover();
    const drawing = await w.there('.monaco-hover:not(.hidden) .hover-row img');
    await w.until('the drawing', () => drawing.evaluate((e) => e.complete && e.naturalWidth > 50));
    await w.picture('11-hover-section');
    await w.page.keyboard.press('Escape');
  },

  async 'a setting names another server, and a wrong one is explained'(w) {
    w.settings({ 'kern.server.path': '/nowhere/kern' });
    await w.there('.notification-list-item-message', "names '/nowhere/kern', which is not a program that can be run");
    await w.picture('12-no-server');
    w.settings({});
    await w.command('Notifications: Clear All Notifications');
    await w.command('kern: Show Status');
    await w.there('.notification-list-item-message', 'Server: running');
    await w.command('Notifications: Clear All Notifications');
  },

  async 'the server restarts, and its output can be opened'(w) {
    await w.command('kern: Restart Server');
    await w.open('gallery.kern');
    await w.there('.squiggly-error');
    await w.command('kern: Open Output');
    await w.until('the log', async () => /server: .*bin\/kern, from the extension/.test(blanks(await w.page.locator('.panel .view-lines').innerText())));
    await w.picture('13-output');
    await w.command('View: Toggle Output');
  },
};

const w = await Workbench.start({ dir, project, vsix, pictures });
let failed = false;
for (const [name, run] of Object.entries(steps)) {
  try {
    await run(w);
    console.log(`ok    ${name}`);
  } catch (error) {
    console.log(`FAIL  ${name}\n${error.stack ?? error}`);
    await w.picture('failed').catch(() => {});
    failed = true;
    break;
  }
}
await w.stop();
process.exitCode = failed ? 1 : 0;
