// The page as a whole, whatever its panels show: that it starts, stays quiet and keeps to itself.
import assert from 'node:assert/strict';
import {readFileSync, statSync} from 'node:fs';
import {join, resolve} from 'node:path';
import {pageFolder, test} from './harness.mjs';

const kPage = 'rejoinder.html';

test('the page starts from disk with findings in sight, and asks for nothing but its own file', async (t) => {
  const visit = await t.open(kPage);
  assert.ok(await visit.colours() > 10, 'the drawing is blank');
  await visit.screenshot('first_opening');
  assert.deepEqual(visit.requests.map((address) => address.replace(/.*\//, '')), [kPage]);
  assert.ok((await visit.text()).length > 100, 'the text region is empty');
});

test('the page is one file of moderate size that tells nothing of where it was built', () => {
  const path = join(pageFolder, kPage);
  assert.ok(statSync(path).size < 3e6);
  const html = readFileSync(path, 'utf8');
  // The program itself is deflated, so it is read beside the page.
  const program = readFileSync(join(pageFolder, 'page.wasm'), 'latin1');
  const tree = resolve(new URL('../..', import.meta.url).pathname);
  for (const text of [html, program]) assert.ok(!text.includes(tree));
  assert.ok(!/<(script|link|img)[^>]*(src|href)=/.test(html.replace(/<script>[^]*?<\/script>/g, '')));
});

test('the policy of the page stands before all scripts and forbids every request', () => {
  const html = readFileSync(join(pageFolder, kPage), 'utf8');
  const policy = html.match(/Content-Security-Policy" content="([^"]*)"/)[1];
  for (const rule of ["default-src 'none'", "connect-src 'none'", "form-action 'none'", "base-uri 'none'"]) {
    assert.ok(policy.includes(rule), rule);
  }
  assert.doesNotMatch(policy, /script-src[^;]*unsafe-inline/);
  assert.ok(html.indexOf('Content-Security-Policy') < html.indexOf('<script'), 'the policy must come before scripts');
});

test('the page draws nothing while nothing happens', async (t) => {
  const visit = await t.open(kPage);
  await visit.page.evaluate(() => new Promise((resolve) => setTimeout(resolve, 1500)));
  await visit.rest();
  const before = await visit.frames();
  await visit.page.evaluate(() => new Promise((resolve) => setTimeout(resolve, 3000)));
  assert.equal(await visit.frames(), before);
});

test('the page draws at every size and pixel ratio that it is made for', async (t) => {
  for (const [width, height, ratio] of [[700, 900, 1], [1000, 700, 2], [1920, 1080, 1], [3840, 1200, 1], [820, 600, 3]]) {
    const visit = await t.open(kPage, {width, height, ratio});
    assert.equal((await visit.backing()).width, width * ratio);
    assert.ok(await visit.colours() > 10, `blank at ${width} by ${height}, ratio ${ratio}`);
    await visit.screenshot(`size_${width}x${height}@${ratio}`);
    await visit.page.close();
  }
});
