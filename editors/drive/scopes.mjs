// Holds the TextMate grammar against lines of the language, with the workbench's own tokeniser:
//   node scopes.mjs WORKBENCH GRAMMAR
import assert from 'node:assert/strict';
import fs from 'node:fs';
import { createRequire } from 'node:module';
import path from 'node:path';

const [dir, grammar] = process.argv.slice(2);
const modules = path.join(dir, 'node_modules/code-server/lib/vscode/node_modules');
const require = createRequire(path.join(modules, 'x.js'));
const { Registry, INITIAL } = require('vscode-textmate');
const oniguruma = require('vscode-oniguruma');
await oniguruma.loadWASM(fs.readFileSync(path.join(modules, 'vscode-oniguruma/release/onig.wasm')).buffer);
const registry = new Registry({
  onigLib: Promise.resolve({ createOnigScanner: (p) => new oniguruma.OnigScanner(p), createOnigString: (s) => new oniguruma.OnigString(s) }),
  loadGrammar: async () => JSON.parse(fs.readFileSync(grammar, 'utf8')),
});
const kern = await registry.loadGrammar('source.kern');

/** scopes writes a line with its scopes in brackets. */
function scopes(line) {
  return kern.tokenizeLine(line, INITIAL).tokens.map((t) => {
    const text = line.slice(t.startIndex, t.endIndex);
    const scope = t.scopes.slice(1).filter((s) => !s.startsWith('punctuation')).map((s) => s.replace(/\.kern$/, '')).pop();
    return scope ? `[${scope}:${text}]` : text;
  }).join('').replaceAll(/\[string\.quoted\.double:([^\]]*)\]/g, '$1').replaceAll(/\[comment[^:]*:([^\]]*)\]/g, '<$1>').replaceAll('><', '');
}

const want = [
  ['column A1, A2 "Post" as B1 {  # held', '[keyword.control:column] [entity.name.type:A1, A2] "Post" [storage.modifier:as] B1 {  <# held>'],
  ['    load G -1_200.5 kip-ft about major at top', '    [keyword.control:load] G [keyword.operator:-][constant.numeric:1_200.5] [keyword.other.unit:kip-ft] [storage.modifier:about] [storage.modifier:major] [storage.modifier:at] [storage.modifier:top]'],
  ['    section = post; material = "S355"', '    [variable.other.property:section] [keyword.operator:=] post; [variable.other.property:material] [keyword.operator:=] "S355"'],
  ['section s = tube { width = 90 mm; made = hot }', '[keyword.control:section] [entity.name.type:s] [keyword.operator:=] [support.type:tube] { [variable.other.property:width] [keyword.operator:=] [constant.numeric:90] [keyword.other.unit:mm]; [variable.other.property:made] [keyword.operator:=] [storage.modifier:hot] }'],
  ['a = max(b2, 2.5e-3 m²) * g - 5 kN*m/rad', '[variable.other.constant:a] [keyword.operator:=] [support.function:max](b2, [constant.numeric:2.5e-3] [keyword.other.unit:m²]) [keyword.operator:*] [constant.language:g] [keyword.operator:-] [constant.numeric:5] [keyword.other.unit:kN*m/rad]'],
  ['level roof at 14 ft 6 in { G 4.1kN/m2; Q 5 % }', '[keyword.control:level] [entity.name.type:roof] [storage.modifier:at] [constant.numeric:14] [keyword.other.unit:ft] [constant.numeric:6] [keyword.other.unit:in] { G [constant.numeric:4.1][keyword.other.unit:kN/m2]; Q [constant.numeric:5] [keyword.other.unit:%] }'],
  ['    show kN, N/mm2; selfweight off', '    [keyword.control:show] [keyword.other.unit:kN], [keyword.other.unit:N/mm2]; [keyword.control:selfweight] [storage.modifier:off]'],
  ['combination up = 0.9 G - 1.5 W', '[keyword.control:combination] [entity.name.type:up] [keyword.operator:=] [constant.numeric:0.9] G [keyword.operator:-] [constant.numeric:1.5] W'],
  ['    require N_b_minor >= 400 kN because "room', '    [keyword.control:require] N_b_minor [keyword.operator:>=] [constant.numeric:400] [keyword.other.unit:kN] [storage.modifier:because] "room'],
  ['loads = hold_2 + topmost', '[variable.other.constant:loads] [keyword.operator:=] hold_2 [keyword.operator:+] topmost'],
];
for (const [line, scoped] of want) assert.equal(scopes(line), scoped);
console.log(`ok    ${want.length} lines have their scopes`);
