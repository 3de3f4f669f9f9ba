// Two coefficients, two standard errors and n are enough for a first finding.
import {test} from './harness.mjs';
import {kAtLeast, openPage, pick} from './workbench.mjs';

test('five figures give a finding and begin a review', async (t) => {
  const visit = await openPage(t);
  await pick(visit, 'button/more', 'Type five figures');
  await visit.mark('five/coef1');
  for (const [id, text] of [['coef1', '1.00'], ['se1', '0.25'], ['coef2', '0.30'], ['se2', '0.20'], ['n', '100']]) {
    await visit.click(`five/${id}`);
    await visit.type(text);
  }
  await visit.screenshot('five_figures');
  await visit.click('five/begin');
  await visit.waitForText('Both coefficients are zero.');
  await visit.waitForText(kAtLeast);
  await visit.key('Control+z');
  await visit.waitForText('What fills a mountain hut?');
});
