'use strict';
// "Show working": the derivation of a member as a read-only document beside its
// text, which follows the text as it is edited.

const vscode = require('vscode');

const command = 'kern.showWorking'; // of the code lenses: a file's address, a member
const scheme = 'kern-derivation';
const pause = 300; // milliseconds after an edit

/** address is the address of the document with the working of a member. */
function address(file, member) {
  return vscode.Uri.from({ scheme, path: `/${member}.md`, query: file });
}

/** open shows the working of a member beside the text: laid out, or as Markdown where nothing lays it out. */
async function open(file, member) {
  const document = await vscode.workspace.openTextDocument(address(file, member));
  if (vscode.extensions.getExtension('vscode.markdown-language-features')) {
    await vscode.commands.executeCommand('markdown.showPreviewToSide', document.uri);
  } else {
    await vscode.window.showTextDocument(document, { viewColumn: vscode.ViewColumn.Beside, preserveFocus: true, preview: true });
  }
}

/** at opens the working of the member at or above the cursor. */
async function at(editor) {
  const lenses = await vscode.commands.executeCommand('vscode.executeCodeLensProvider', editor.document.uri, 10000) || [];
  const line = editor.selection.active.line;
  const above = lenses.filter((l) => l.command && l.command.command === command && l.range.start.line <= line);
  if (above.length === 0) {
    vscode.window.showInformationMessage('kern: there is no member at or above the cursor.');
    return;
  }
  const nearest = above.reduce((a, b) => (b.range.start.line > a.range.start.line ? b : a));
  await open(...nearest.command.arguments);
}

/** provide makes the documents; ask(file, member) gives the text of one. */
function provide(ask) {
  const changed = new vscode.EventEmitter();
  let timer;
  const again = () => {
    for (const d of vscode.workspace.textDocuments) if (d.uri.scheme === scheme) changed.fire(d.uri);
  };
  return vscode.Disposable.from(
    changed,
    vscode.workspace.registerTextDocumentContentProvider(scheme, {
      onDidChange: changed.event,
      provideTextDocumentContent: async (uri) => {
        try {
          return await ask(uri.query, uri.path.slice(1, -'.md'.length));
        } catch (error) {
          return `${error.message || error}\n`; // the member may be gone
        }
      },
    }),
    vscode.workspace.onDidChangeTextDocument((e) => {
      if (e.document.languageId !== 'kern') return;
      clearTimeout(timer);
      timer = setTimeout(again, pause);
    }),
  );
}

module.exports = { command, open, at, provide };
