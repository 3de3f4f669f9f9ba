// Makes the one file that is the page.
//
//   node web/pack.mjs OUT.html PAGE.html MODULE.js MODULE.wasm SCRIPT.js ...
//
// The compiled program is deflated and carried as base 64, which halves it against plain base 64. A policy in the
// file itself forbids every request, and every script but the two whose hashes it names.
import {createHash} from 'node:crypto';
import {readFileSync, writeFileSync} from 'node:fs';
import {basename} from 'node:path';
import {deflateRawSync, gzipSync} from 'node:zlib';

const [outPath, pagePath, modulePath, wasmPath, ...scriptPaths] = process.argv.slice(2);
if (!scriptPaths.length) {
  console.error('usage: node web/pack.mjs OUT.html PAGE.html MODULE.js MODULE.wasm SCRIPT.js ...');
  process.exit(2);
}
const read = (path) => readFileSync(path, 'utf8');

// What would end a script element early, or begin a comment in it, written so that it means the same to JavaScript.
const insideScript = (code) => code.replace(/<\/script/gi, '<\\/script').replace(/<!--/g, '<\\!--');
const hashOf = (text) => `'sha256-${createHash('sha256').update(text, 'utf8').digest('base64')}'`;

const own = `(() => {\n'use strict';\n${scriptPaths.map(read).join('\n')}\n})();`;
const scripts = [read(modulePath), own].map(insideScript);

// Styles may stand in the page: a report opened in a new tab inherits this policy and brings its own. They cannot
// load anything either.
const policy = [
  `default-src 'none'`, `script-src ${scripts.map(hashOf).join(' ')} 'wasm-unsafe-eval'`, `style-src 'unsafe-inline'`,
  `img-src data: blob:`, `connect-src 'none'`, `form-action 'none'`, `base-uri 'none'`,
].join('; ');

const wasm = readFileSync(wasmPath);
const packed = deflateRawSync(wasm, {level: 9, memLevel: 9}).toString('base64');
const program = `<script type="application/octet-stream" id="program">${packed}</script>\n` +
    scripts.map((code) => `<script>${code}</script>`).join('\n');

// Functions, because "$&" and the like in compiled code would be taken as patterns.
const page = read(pagePath)
    .replace('<!-- policy -->', () => `<meta http-equiv="Content-Security-Policy" content="${policy}">`)
    .replace('<!-- program -->', () => program);
writeFileSync(outPath, page);

const kilobytes = (bytes) => `${Math.round(bytes / 1000)} kB`;
console.log(`${basename(outPath)}: ${kilobytes(Buffer.byteLength(page))}, ${kilobytes(gzipSync(page, {level: 9}).length)} when ` +
            `compressed for sending; program ${kilobytes(wasm.length)}`);
