// Runs the browser tests.
//
//   node tests/browser/run.mjs [--results FILE.json] [WORDS ...]
//
// With WORDS, only tests whose file or name holds one of them. REJOINDER_BROWSER names another browser than the
// Chromium on the path, REJOINDER_WEB_BUILD another folder than build/web. Exit status 0 when all tests pass.
import {existsSync, mkdtempSync, readdirSync, rmSync, writeFileSync} from 'node:fs';
import {tmpdir} from 'node:os';
import {delimiter, dirname, join} from 'node:path';
import {fileURLToPath} from 'node:url';
import puppeteer from 'puppeteer-core';
import {setCurrentFile, tests, Trial} from './harness.mjs';

const kLongest = 120000;  // milliseconds for one test

function findBrowser() {
  if (process.env.REJOINDER_BROWSER) return process.env.REJOINDER_BROWSER;
  for (const folder of (process.env.PATH || '').split(delimiter)) {
    for (const name of ['chromium', 'chromium-browser', 'google-chrome']) {
      if (existsSync(join(folder, name))) return join(folder, name);
    }
  }
  console.error('No Chromium found. Run .setup/packages, or name a browser in REJOINDER_BROWSER.');
  process.exit(2);
}

const words = process.argv.slice(2);
let resultsPath = '';
const at = words.indexOf('--results');
if (at >= 0) [, resultsPath] = words.splice(at, 2);

const here = dirname(fileURLToPath(import.meta.url));
for (const file of readdirSync(here).filter((name) => name.endsWith('_test.mjs')).sort()) {
  setCurrentFile(file);
  await import(join(here, file));
}
const chosen = tests.filter(({file, name}) => !words.length || words.some((word) => `${file} ${name}`.includes(word)));

// Drawing without a graphics card; nothing the browser does by itself may reach out.
const profile = mkdtempSync(join(tmpdir(), 'rejoinder-browser-'));
const browser = await puppeteer.launch({
  executablePath: findBrowser(),
  userDataDir: profile,
  args: [
    ...(process.getuid?.() === 0 ? ['--no-sandbox'] : []), '--use-angle=swiftshader', '--enable-unsafe-swiftshader',
    '--disable-quic', '--no-first-run', '--disable-background-networking', '--disable-component-update',
    '--disable-sync', '--disable-dev-shm-usage',
  ],
});

let passed = 0;
let failed = 0;
for (const {file, name, run} of chosen) {
  const began = Date.now();
  const trial = new Trial(browser);
  let fault = null;
  let timer;
  try {
    const tooLong = new Promise((resolve, reject) => {
      timer = setTimeout(() => reject(new Error(`not done after ${kLongest / 1000} s`)), kLongest);
    });
    await Promise.race([run(trial), tooLong]);
    for (const visit of trial.visits) {
      if (visit.faults.length) throw new Error(`the page met: ${visit.faults.map((each) => each.slice(0, 200)).slice(0, 3).join('; ')}`);
    }
  } catch (thrown) {
    fault = thrown;
    const picture = `${file} ${name}`.replace(/\W+/g, '_');
    for (const visit of trial.visits.filter(({page}) => !page.isClosed())) await visit.screenshot(`failed_${picture}`).catch(() => {});
  }
  clearTimeout(timer);
  await trial.close().catch(() => {});
  const time = `${((Date.now() - began) / 1000).toFixed(1)} s`;
  if (fault) {
    ++failed;
    console.log(`  failed  ${file}: ${name} (${time})\n${String(fault.stack || fault).replace(/^/gm, '          ')}`);
  } else {
    ++passed;
    console.log(`  passed  ${file}: ${name} (${time})`);
  }
}
await browser.close();
rmSync(profile, {recursive: true, force: true, maxRetries: 5});

if (resultsPath) writeFileSync(resultsPath, JSON.stringify({passed, failed}));
console.log(`browser tests: ${passed} passed, ${failed} failed`);
process.exit(failed || !chosen.length ? 1 : 0);
