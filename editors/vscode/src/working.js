'use strict';
// "Show working": the derivation of a member as a read-only document beside its
// text. The server makes the document; its address is the argument of the code
// lens above the member.

const vscode = require('vscode');

const command = 'kern.showWorking';

/** open shows the document of a derivation beside the text. */
async function open(address) {
  const document = await vscode.workspace.openTextDocument(vscode.Uri.parse(address));
  await vscode.window.showTextDocument(document, { viewColumn: vscode.ViewColumn.Beside, preserveFocus: true, preview: true });
}

/** at opens the working of the member at or above the cursor. */
async function at(editor) {
  const lenses = await vscode.commands.executeCommand('vscode.executeCodeLensProvider', editor.document.uri, 1000) || [];
  const line = editor.selection.active.line;
  const above = lenses.filter((l) => l.command && l.command.command === command && l.range.start.line <= line);
  if (above.length === 0) {
    vscode.window.showInformationMessage('kern: there is no member at or above the cursor.');
    return;
  }
  const nearest = above.reduce((a, b) => (b.range.start.line > a.range.start.line ? b : a));
  await open(...nearest.command.arguments);
}

module.exports = { command, open, at };
