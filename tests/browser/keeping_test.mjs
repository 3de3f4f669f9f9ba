// The review is kept on this machine as it is typed, and the page says so.
import {test} from './harness.mjs';
import {fill, kAtLeastChanged, kOpen, kReview, openPage} from './workbench.mjs';

test('a reload brings the review back as it was left', async (t) => {
  const visit = await openPage(t);
  await visit.paste(kReview);
  await visit.waitForText('Cable cars');
  await fill(visit, 'cell/0/wind/coef', '0.50');
  await visit.waitForKept((text) => text.includes('0.50'));
  await visit.waitForText(/kept on this machine, \d\d:\d\d; nothing is sent/);
  await visit.reload();
  await visit.waitForText('Cable cars');
  await visit.waitForText(kAtLeastChanged);
  await visit.waitForText(kOpen);
  await visit.waitForText('your review, as you left it');
});

test('another review kept on this machine is listed under Open, and opens', async (t) => {
  const first = await openPage(t);
  await first.paste(kReview);
  await first.waitForKept((text) => text.includes('Cable cars'));
  const second = await openPage(t);
  await second.waitForText('What fills a mountain hut?');
  await first.page.close();  // a window that is open keeps its review to itself
  await second.click('button/open');
  await second.mark('menu/A file');
  const kept = (await second.marks()).find(({id}) => id.startsWith('menu/Cable cars, '));
  await Promise.all([second.page.waitForNavigation(), second.click(kept.id).catch(() => {})]);
  await second.waitUntilReady();
  await second.waitForText('Cable cars');
});
