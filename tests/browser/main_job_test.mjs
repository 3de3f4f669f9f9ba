// The main job: from the figures of a paper to a finding, by pointer and keys and by keys alone.
import {test} from './harness.mjs';
import {
  beginEmptyReview, fill, kAtLeast, kAtLeastChanged, kConflict, kOpen, kSays, openPage, pickByKeys, tabTo, typeClaim,
  typeTable,
} from './workbench.mjs';

test('a table and a claim typed into an empty review give the finding, and every change another', async (t) => {
  const visit = await openPage(t);
  await beginEmptyReview(visit);
  await typeTable(visit);
  await typeClaim(visit);
  await visit.waitForText(kSays);
  await visit.waitForText(kAtLeast);
  await visit.waitForText(kConflict);
  await visit.waitForText('(2, 97)');
  await visit.screenshot('main_job');

  await fill(visit, 'cell/0/wind/coef', '0.50');
  await visit.waitForText(kAtLeastChanged);
  await visit.waitForText(kOpen);

  await visit.key('Control+z');
  await visit.waitForText(kAtLeast);
  await visit.waitForText(kConflict);

  await visit.key('Control+Shift+z');
  await visit.waitForText(kAtLeastChanged);
  await visit.click('button/undo');
  await visit.waitForText(kConflict);
  await visit.click('button/redo');
  await visit.waitForText(kOpen);
});

test('the same by keys alone', async (t) => {
  const visit = await openPage(t);
  await tabTo(visit, 'button/more');
  await pickByKeys(visit, 'Begin an empty review');
  await visit.waitForText('Untitled review');

  await tabTo(visit, 'term/new');
  for (const name of ['wind', 'fog']) {
    await visit.type(name);
    await visit.key('Enter');
  }
  // From there back to the first cell; Enter leads down the column, through the terms and on to the foot.
  await tabTo(visit, 'cell/0/wind/coef', 'Shift+Tab');
  for (const figure of ['1.00', '0.25', '0.30', '0.20', '100', '2']) {
    await visit.type(figure);
    await visit.key('Enter');
  }
  await tabTo(visit, 'button/add-claim');
  await visit.key('Enter');
  await tabTo(visit, 'claim/0/says');
  await visit.type(kSays);
  await tabTo(visit, 'claim/0/restrictions');
  await visit.type('wind = fog = 0');
  await tabTo(visit, 'claim/0/f');
  await visit.type('5.00');
  await visit.waitForText(kAtLeast);
  await visit.waitForText(kConflict);

  await tabTo(visit, 'cell/0/wind/coef', 'Shift+Tab');
  await visit.type('0.50');
  await visit.waitForText(kAtLeastChanged);
  await visit.waitForText(kOpen);
  await visit.key('Control+z');
  await visit.waitForText(kConflict);
  await visit.key('Control+y');
  await visit.waitForText(kOpen);
});

test('a figure typed where a column does not list the term takes the term into the column', async (t) => {
  const visit = await openPage(t);
  await visit.paste(`rejoinder = 1
title = "Two columns"
[[column]]
id = "1"
n = 100
k = 1
  [[column.term]]
  name = "wind"
  coef = "1.00"
  se = "0.25"
[[column]]
id = "2"
n = 100
k = 2
  [[column.term]]
  name = "fog"
  coef = "0.30"
  se = "0.20"
  [[column.term]]
  name = "wind"
  coef = "0.90"
  se = "0.26"
`);
  await visit.waitForText('not in the column');
  await fill(visit, 'cell/0/fog/coef', '0.31');
  await visit.waitForText('0.31');
  await fill(visit, 'cell/0/fog/se', '0.21');
  await visit.waitForText('0.31 (s.e. 0.21)');
  await visit.key('Control+z');
  await visit.key('Control+z');
  await visit.waitForText('not in the column');
});
