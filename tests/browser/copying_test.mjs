// Words for the report reach the clipboard.
import assert from 'node:assert/strict';
import {test} from './harness.mjs';
import {kReview, kSays, openPage, tabTo} from './workbench.mjs';

test('the paragraph for the report is copied by its button and by the usual key', async (t) => {
  const visit = await openPage(t);
  await visit.paste(kReview);
  await visit.waitForText('Cable cars');
  const byKey = await visit.copy();
  assert.ok(byKey.includes(kSays) && byKey.includes('F(2, 97) is at least 7.61'), byKey);
  await visit.setClipboard('something else');
  await tabTo(visit, 'drawer/words', 'Shift+Tab');
  await visit.key('Enter');
  await tabTo(visit, 'button/copy-words');
  await visit.key('Enter');
  await visit.waitForText('the paragraph copied');
  assert.equal(await visit.clipboard(), byKey);
});
