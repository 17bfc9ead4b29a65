'use strict';

const vscode = require('vscode');
const { LanguageClient, State } = require('vscode-languageclient/node');
const server = require('./server');
const working = require('./working');

let client; // undefined while no server was found
let found = {};
let output, item;

const states = { [State.Stopped]: 'stopped', [State.Starting]: 'starting', [State.Running]: 'running' };

function state() {
  return client ? states[client.state] || 'starting' : 'not found';
}

function showState() {
  const bad = !client || client.state === State.Stopped;
  item.text = `kern: ${state()}`;
  item.detail = found.command ? `${found.command}, from ${found.from}` : found.problem;
  item.severity = bad ? vscode.LanguageStatusSeverity.Error : vscode.LanguageStatusSeverity.Information;
  item.busy = Boolean(client) && client.state === State.Starting;
}

/** settings keeps what is the extension's own from the server, which does not know it. */
function settings(params, token, next) {
  const own = (value) => {
    if (!value || typeof value !== 'object') return value;
    const { server: _, ...rest } = value;
    return rest;
  };
  return Promise.resolve(next(params, token)).then((values) => (Array.isArray(values) ? values.map(own) : values));
}

/** explain tells what is wrong; it is not waited for, since a message stays open until somebody answers it. */
async function explain(problem) {
  const answer = await vscode.window.showErrorMessage(`kern: ${problem}`, 'Open Settings');
  if (answer) await vscode.commands.executeCommand('workbench.action.openSettings', 'kern.server.path');
}

async function start(context) {
  found = server.find(vscode.workspace.getConfiguration('kern').get('server.path', ''), context.extensionPath, process.env.PATH);
  if (found.problem) {
    output.error(found.problem);
    showState();
    explain(found.problem);
    return;
  }
  output.info(`server: ${found.command}, from ${found.from}`);
  client = new LanguageClient('kern', 'kern', { command: found.command, args: ['lsp'] }, {
    documentSelector: [{ language: 'kern', scheme: 'file' }, { language: 'kern', scheme: 'untitled' }],
    outputChannel: output,
    middleware: {
      workspace: {
        configuration: settings,
        didChangeConfiguration: (sections, next) => (stopping ? Promise.resolve() : next(sections)),
      },
    },
  });
  client.onDidChangeState(showState);
  showState();
  try {
    await client.start();
  } catch (error) {
    output.error(`the server did not start: ${error.message || error}`);
    vscode.window.showErrorMessage(`kern: the server did not start: ${error.message || error}`);
  }
  showState();
}

async function stop() {
  const old = client;
  client = undefined;
  if (old) await old.dispose().catch((error) => output.warn(`the server did not stop in order: ${error.message || error}`));
}

let turn = Promise.resolve(); // starts and stops, one after the other
let stopping = false; // the server is about to go: it is told nothing more

function restart(context) {
  stopping = true;
  turn = turn.then(stop).then(() => {
    stopping = false;
    return start(context);
  });
  return turn;
}

async function showStatus() {
  const info = client && client.initializeResult && client.initializeResult.serverInfo;
  const lines = [`Server: ${state()}`];
  if (info) lines.push(`Version: ${info.version || 'unknown'}`);
  lines.push(found.command ? `Program: ${found.command}, from ${found.from}` : found.problem);
  const answer = await vscode.window.showInformationMessage(lines.join('. '), 'Restart Server', 'Open Output');
  if (answer) await vscode.commands.executeCommand(answer === 'Open Output' ? 'kern.openOutput' : 'kern.restartServer');
}

/** openSheet shows the printed calculation of the file in the editor, as its text is now, beside it. */
async function openSheet() {
  const editor = vscode.window.activeTextEditor;
  if (!editor || editor.document.languageId !== 'kern') return;
  if (!client) throw new Error('The server does not run.');
  const file = client.code2ProtocolConverter.asUri(editor.document.uri);
  const html = await client.sendRequest('workspace/executeCommand', { command: 'kern.sheet', arguments: [file] });
  const name = editor.document.uri.path.split('/').pop();
  const panel = vscode.window.createWebviewPanel('kern.sheet', `Sheet of ${name}`, vscode.ViewColumn.Beside, { enableFindWidget: true });
  panel.webview.html = html;
}

function activate(context) {
  output = vscode.window.createOutputChannel('kern', { log: true });
  item = vscode.languages.createLanguageStatusItem('kern.server', { language: 'kern' });
  item.name = 'kern';
  item.command = { command: 'kern.showStatus', title: 'Show Status' };
  const command = (name, run) => context.subscriptions.push(vscode.commands.registerCommand(name, run));
  command('kern.restartServer', () => restart(context));
  command('kern.showStatus', showStatus);
  command('kern.openOutput', () => output.show(true));
  command('kern.showWorkingHere', () => vscode.window.activeTextEditor && working.at(vscode.window.activeTextEditor));
  command(working.command, working.open);
  command('kern.openSheet', openSheet);
  context.subscriptions.push(working.provide((file, member) => {
    if (!client) throw new Error('The server does not run.');
    return client.sendRequest('workspace/executeCommand', { command: 'kern.working', arguments: [file, member] });
  }));
  context.subscriptions.push(output, item, vscode.workspace.onDidChangeConfiguration((e) => {
    if (e.affectsConfiguration('kern.server.path')) restart(context);
  }));
  turn = start(context);
}

function deactivate() {
  return stop();
}

module.exports = { activate, deactivate };
