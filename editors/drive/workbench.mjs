// A real VS Code workbench (installed by workbench-install.sh) in headless Chromium, with one extension:
// everything on 127.0.0.1, in a profile of its own that is removed at the end.
import { spawn, spawnSync } from 'node:child_process';
import fs from 'node:fs';
import { createRequire } from 'node:module';
import os from 'node:os';
import path from 'node:path';

const quiet = {
  'workbench.startupEditor': 'none', 'workbench.tips.enabled': false, 'workbench.enableExperiments': false,
  'workbench.colorTheme': 'Default Light Modern', 'workbench.secondarySideBar.defaultVisibility': 'hidden',
  'chat.commandCenter.enabled': false, 'window.commandCenter': false, 'security.workspace.trust.enabled': false,
  'telemetry.telemetryLevel': 'off', 'update.mode': 'none', 'extensions.autoUpdate': false, 'extensions.autoCheckUpdates': false,
  'extensions.ignoreRecommendations': true, 'git.enabled': false, 'git.openRepositoryInParentFolders': 'never',
  'editor.minimap.enabled': false, 'editor.cursorBlinking': 'solid', 'editor.fontFamily': 'DejaVu Sans Mono', 'editor.fontSize': 14,
  'editor.hover.sticky': true, 'workbench.reduceMotion': 'on', 'files.autoSave': 'off', 'files.simpleDialog.enable': true,
};

export class Workbench {
  /** start opens the folder `project` with the extension `vsix`; pictures go to `pictures`. */
  static async start({ dir, project, vsix, pictures, settings = {}, patience = 120_000 }) {
    const w = new Workbench();
    Object.assign(w, { project, pictures, patience });
    const { chromium } = createRequire(path.join(dir, 'package.json'))('playwright-core');
    const entry = path.join(dir, 'node_modules/code-server/out/node/entry.js');
    w.profile = fs.mkdtempSync(path.join(os.tmpdir(), 'kern-workbench-'));
    try {
      const data = path.join(w.profile, 'data');
      fs.mkdirSync(path.join(data, 'User'), { recursive: true });
      fs.writeFileSync(path.join(data, 'User/settings.json'), JSON.stringify({ ...quiet, ...settings }));
      fs.writeFileSync(path.join(w.profile, 'config.yaml'), '');
      // An empty gallery address keeps it from asking for one.
      const env = { ...process.env, XDG_DATA_HOME: path.join(w.profile, 'share'), EXTENSIONS_GALLERY: '{"serviceUrl":""}' };
      for (const k of ['PORT', 'PASSWORD', 'HASHED_PASSWORD', 'VSCODE_IPC_HOOK_CLI', 'NODE_OPTIONS', 'CODE_SERVER_CONFIG']) delete env[k];
      const common = ['--config', path.join(w.profile, 'config.yaml'), '--user-data-dir', data, '--extensions-dir', path.join(w.profile, 'extensions'), '--disable-telemetry'];
      const installed = spawnSync(process.execPath, [entry, ...common, '--install-extension', vsix], { env, encoding: 'utf8' });
      if (installed.status || !/successfully installed/.test(installed.stdout)) throw new Error(`not installed: ${installed.stdout}${installed.stderr}`);
      // A process group of its own, so that the extension host and the server end with it.
      w.server = spawn(process.execPath, [entry, ...common, '--auth', 'none', '--bind-addr', '127.0.0.1:0', '--disable-update-check',
        '--disable-workspace-trust', '--disable-getting-started-override', project], { env, detached: true, cwd: w.profile });
      w.base = await new Promise((resolve, reject) => {
        let said = '';
        const hear = (d) => {
          said += d;
          const m = said.match(/listening on (http:\/\/127\.0\.0\.1:\d+)/);
          if (m) resolve(m[1]);
        };
        w.server.stdout.on('data', hear);
        w.server.stderr.on('data', hear);
        w.server.on('exit', (code) => reject(new Error(`the workbench ended with ${code}: ${said}`)));
        setTimeout(() => reject(new Error(`the workbench did not start: ${said}`)), patience).unref();
      });
      w.browser = await chromium.launch({
        executablePath: process.env.CHROMIUM ?? '/usr/bin/chromium', headless: true, env: { ...process.env, HOME: w.profile },
        args: ['--no-sandbox', '--disable-gpu', '--disable-quic', '--no-first-run', '--disable-background-networking', '--disable-component-update',
          '--disable-sync', '--disable-dev-shm-usage', '--host-resolver-rules=MAP * ~NOTFOUND , EXCLUDE 127.0.0.1', '--force-color-profile=srgb'],
      });
      const context = await w.browser.newContext({ viewport: { width: 1440, height: 900 }, reducedMotion: 'reduce', locale: 'en-GB' });
      await context.route((u) => u.hostname !== '127.0.0.1' && /^https?:$/.test(u.protocol), (r) => r.abort());
      w.page = await context.newPage();
      w.page.setDefaultTimeout(patience);
      await w.page.goto(`${w.base}/?folder=${encodeURIComponent(project)}`);
      await w.page.waitForSelector('.monaco-workbench');
    } catch (error) {
      await w.stop();
      throw error;
    }
    return w;
  }

  async stop() {
    await this.browser?.close().catch(() => {});
    if (this.server?.pid && this.server.exitCode === null) {
      const gone = new Promise((r) => this.server.once('exit', r));
      try { process.kill(-this.server.pid, 'SIGTERM'); } catch { /* ended already */ }
      await Promise.race([gone, new Promise((r) => setTimeout(r, 5000))]);
      try { process.kill(-this.server.pid, 'SIGKILL'); } catch { /* ended already */ }
    }
    fs.rmSync(this.profile, { recursive: true, force: true, maxRetries: 5, retryDelay: 200 });
  }

  /** editor is the editor that has the focus. */
  get editor() { return this.page.locator('.editor-group-container.active .editor-instance .monaco-editor').first(); }

  async picture(name) { await this.page.screenshot({ path: path.join(this.pictures, `${name}.png`), animations: 'disabled' }); }

  async quickInput(prefix, text) {
    const input = this.page.locator('.quick-input-widget input[type="text"]');
    await input.waitFor();
    await input.fill(prefix + text);
    return input;
  }

  /** open opens a file of the project by its name. */
  async open(file) {
    await this.page.keyboard.press('Control+p');
    const input = await this.quickInput('', file);
    await this.page.locator('.quick-input-list .monaco-list-row.focused', { hasText: path.basename(file) }).first().waitFor();
    await input.press('Enter');
    await this.page.locator('.editor-group-container.active .tab.active', { hasText: path.basename(file) }).waitFor();
    await this.editor.locator('.view-line').first().waitFor();
  }

  /** goto puts the cursor at a line and column, from 1. */
  async goto(line, column = 1) {
    await this.page.keyboard.press('Control+g');
    await (await this.quickInput(':', `${line}:${column}`)).press('Enter');
    await this.page.locator('.quick-input-widget').waitFor({ state: 'hidden' });
  }

  /** cursor puts the cursor before a text of a file as it is on the disk, or some characters further on. */
  async cursor(file, text, further = 0) {
    const whole = this.read(file);
    const at = whole.indexOf(text);
    if (at < 0) throw new Error(`${file} has no '${text}'`);
    const before = whole.slice(0, at + further).split('\n');
    await this.goto(before.length, before.at(-1).length + 1);
  }

  /** command runs a command of the palette by its title. */
  async command(title) {
    await this.page.keyboard.press('F1');
    const input = await this.quickInput('>', title);
    await this.page.locator('.quick-input-list .monaco-list-row.focused', { hasText: title.split(': ').pop() }).first().waitFor();
    await input.press('Enter');
    await this.page.locator('.quick-input-widget').waitFor({ state: 'hidden' });
  }

  /** there waits until a selector is visible, with a text in it. */
  async there(selector, hasText) {
    const found = this.page.locator(selector, hasText ? { hasText } : {}).first();
    await found.waitFor();
    return found;
  }

  /** until waits until a condition holds. */
  async until(what, condition) {
    const end = Date.now() + this.patience;
    for (;;) {
      const value = await condition();
      if (value) return value;
      if (Date.now() > end) throw new Error(`waited in vain for ${what}`);
      await this.page.waitForTimeout(100);
    }
  }

  /** squiggles counts the wavy lines of a severity in the active editor. */
  async squiggles(severity) { return this.editor.locator(`.squiggly-${severity}`).count(); }

  /** line is the row of the active editor with a text in it. */
  line(text) { return this.editor.locator('.view-line', { hasText: text }).first(); }

  /** save saves the active file and waits until it is on the disk. */
  async save() {
    await this.page.keyboard.press('Control+s');
    await this.page.locator('.editor-group-container.active .tab.active:not(.dirty)').waitFor();
  }

  /** settings writes the settings of the machine, where the path of a program belongs. */
  settings(values) {
    const folder = path.join(this.profile, 'data/Machine');
    fs.mkdirSync(folder, { recursive: true });
    fs.writeFileSync(path.join(folder, 'settings.json'), JSON.stringify(values));
  }

  /** revert gives the active file its text on the disk back. */
  async revert() {
    await this.page.keyboard.press('Escape');
    await this.command('File: Revert File');
    await this.page.locator('.editor-group-container.active .tab.active:not(.dirty)').waitFor();
  }

  /** hover shows what is said at the cursor. */
  async hover() {
    await this.page.keyboard.press('Control+k');
    await this.page.keyboard.press('Control+i');
    await this.page.locator('.monaco-hover:not(.hidden) .hover-row').first().waitFor();
  }

  /** details opens what a suggestion has to say, beside the list. */
  async details() {
    const pane = this.page.locator('.suggest-details-container');
    if (!(await pane.isVisible().catch(() => false))) await this.page.keyboard.press('Control+Space');
    await pane.waitFor();
  }

  read(file) { return fs.readFileSync(path.join(this.project, file), 'utf8'); }
}
