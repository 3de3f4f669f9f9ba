// Pasting anywhere on the page: what was understood is shown first, then taken.
import {test} from './harness.mjs';
import {beginEmptyReview, kAtLeast, kConflict, openPage} from './workbench.mjs';

test('a table from a spreadsheet and a sentence become the review', async (t) => {
  const visit = await openPage(t);
  await beginEmptyReview(visit);
  await visit.paste('\t(1)\nwind\t1.00\n\t(0.25)\nfog\t0.30\n\t(0.20)\nN\t100\nk\t2\n');
  await visit.mark('region/overlay');
  await visit.screenshot('paste_table');
  await visit.click('paste/take');
  await visit.waitForText('1.00 (s.e. 0.25)');

  await visit.paste('Wind and fog matter jointly (F(2, 97) = 5.00).');
  await visit.mark('region/overlay');
  await visit.screenshot('paste_sentence');
  await visit.key('Control+Enter');
  await visit.waitForText('Wind and fog matter jointly');
  await visit.doubleClick('claim/0', {down: 0.15});
  await visit.click('claim/0/restrictions');
  await visit.type('wind = fog = 0');
  await visit.waitForText(kAtLeast);
  await visit.waitForText(kConflict);
});
