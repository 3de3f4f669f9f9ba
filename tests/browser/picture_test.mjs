// The picture at the head of the README: the page as it opens. With REJOINDER_PICTURES=1 it is put in its place,
// demo/workbench.png; without, it is left among the screenshots, so that running the tests changes no file of the tree.
import assert from 'node:assert/strict';
import {copyFileSync} from 'node:fs';
import {join, resolve} from 'node:path';
import {fileURLToPath} from 'node:url';
import {test} from './harness.mjs';

const top = resolve(fileURLToPath(import.meta.url), '../../..');

test('the page opens with the worked case, findings in sight', async (t) => {
  const visit = await t.open('rejoinder.html', {width: 1440, height: 900});
  await visit.waitForText('What fills a mountain hut?');
  await visit.waitForText('Does not match the print');
  const path = await visit.screenshot('workbench');
  assert.ok(await visit.colours() > 20, 'the drawing is blank');
  if (process.env.REJOINDER_PICTURES) copyFileSync(path, join(top, 'demo/workbench.png'));
});
