// The review as a file: saved by the browser's download, opened through its picker.
import assert from 'node:assert/strict';
import {mkdtempSync, readFileSync, rmSync, writeFileSync} from 'node:fs';
import {tmpdir} from 'node:os';
import {join} from 'node:path';
import {test} from './harness.mjs';
import {kAtLeast, kAtLeastChanged, kConflict, kOpen, kReview, openPage} from './workbench.mjs';

// Runs `act` and gives the path of the file that the browser wrote because of it.
async function download(visit, folder, act) {
  const context = visit.page.browserContext();
  const session = await visit.page.browser().target().createCDPSession();
  await session.send('Browser.setDownloadBehavior',
                     {behavior: 'allow', browserContextId: context.id, downloadPath: folder, eventsEnabled: true});
  const done = new Promise((resolve) => {
    let name = '';
    session.on('Browser.downloadWillBegin', (event) => name = event.suggestedFilename);
    session.on('Browser.downloadProgress', ({state}) => {
      if (state === 'completed') resolve(join(folder, name));
    });
  });
  await act();
  const path = await done;
  await session.detach();
  return path;
}

async function openThroughPicker(visit, path, act) {
  const chooser = visit.page.waitForFileChooser();
  await act();
  await (await chooser).accept([path]);
}

test('a review is opened through the picker, changed, saved, and its file read again', async (t) => {
  const folder = mkdtempSync(join(tmpdir(), 'rejoinder-files-'));
  try {
    const visit = await openPage(t);
    const first = join(folder, 'cable-cars.toml');
    writeFileSync(first, kReview);
    await openThroughPicker(visit, first, () => visit.click('button/open'));
    await visit.waitForText(kAtLeast);
    await visit.waitForText(kConflict);
    await visit.waitForText('cable-cars.toml opened');

    await visit.click('cell/0/wind/coef');
    await visit.type('0.50');
    await visit.waitForText(kAtLeastChanged);
    const saved = await download(visit, folder, () => visit.click('button/save'));
    assert.match(saved, /cable-cars\.toml$/);
    const text = readFileSync(saved, 'utf8');
    assert.match(text, /^rejoinder = 1$/m);
    assert.match(text, /coef = "0\.50"/);
    assert.match(text, /se = "0\.25"/);
    assert.match(text, /restrictions = "wind = fog = 0"/);

    await visit.page.close();
    const other = await openPage(t);
    await openThroughPicker(other, saved, () => other.key('Control+o'));
    await other.waitForText(kAtLeastChanged);
    await other.waitForText(kOpen);
    const again = await download(other, folder, () => other.key('Control+s'));
    assert.equal(readFileSync(again, 'utf8'), text);
  } finally {
    rmSync(folder, {recursive: true, force: true});
  }
});
