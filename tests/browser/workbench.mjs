// What the tests of the workbench share: a review in its smallest form, and the ways there by pointer and by keys.
//
// The figures: wind 1.00 (0.25), fog 0.30 (0.20), n = 100, k = 2, and a claim that both are zero with F = 5.00.
// Derived: whatever the unknown covariance, W is at least the larger squared t ratio. With every rounding taken against
// it the t ratio of wind is at least 0.995 / 0.255 = 3.9020, so W >= 15.2253 and F = W / 2 >= 7.6126: F is at least 7.61,
// and 5.00 lies below. With wind at 0.50 it is 0.495 / 0.255 = 1.9412, F >= 1.8841 = 3.7682 / 2: at least 1.88, on
// both sides of the 5 % point of F(2, 97), which is 3.09.
import assert from 'node:assert/strict';

export const kPage = 'rejoinder.html';
export const kAtLeast = 'F is at least 7.61';
export const kAtLeastChanged = 'F is at least 1.88';
export const kConflict = '≠ Does not match the print';
export const kOpen = '? The print cannot say';

export const openPage = (t, options = {}) => t.open(kPage, {width: 1100, height: 760, ...options});

// An item of the menu that a button opens, by its words.
export async function pick(visit, button, words) {
  await visit.click(button);
  await visit.click(`menu/${words}`);
}

export async function beginEmptyReview(visit) {
  await pick(visit, 'button/more', 'Begin an empty review');
  await visit.waitForText('Untitled review');
}

// Puts the pointer into a field or a cell and types there.
export async function fill(visit, id, text) {
  await visit.click(id);
  await visit.type(text);
}

export async function addTerms(visit, names) {
  await visit.click('term/new');
  for (const name of names) {
    await visit.type(name);
    await visit.key('Enter');
  }
}

// The table of the head comment, by the pointer.
export async function typeTable(visit) {
  await addTerms(visit, ['wind', 'fog']);
  await fill(visit, 'cell/0/wind/coef', '1.00');
  await fill(visit, 'cell/0/wind/se', '0.25');
  await fill(visit, 'cell/0/fog/coef', '0.30');
  await fill(visit, 'cell/0/fog/se', '0.20');
  await fill(visit, 'cell/0/foot/n', '100');
  await fill(visit, 'cell/0/foot/k', '2');
}

export const kSays = 'Wind and fog matter jointly.';

export async function typeClaim(visit) {
  await visit.click('button/add-claim');
  await fill(visit, 'claim/0/says', kSays);
  await fill(visit, 'claim/0/restrictions', 'wind = fog = 0');
  await fill(visit, 'claim/0/f', '5.00');
}

// The same review as a file.
export const kReview = `rejoinder = 1
title = "Cable cars"

[[column]]
id = "1"
label = "(1)"
n = 100
k = 2
  [[column.term]]
  name = "wind"
  coef = "1.00"
  se = "0.25"
  [[column.term]]
  name = "fog"
  coef = "0.30"
  se = "0.20"

[[claim]]
id = "joint"
says = "${kSays}"
column = "1"
restrictions = "wind = fog = 0"
f = "5.00"
`;

// ---- by keys alone

export async function focused(visit) {
  return (await visit.marks()).find(({kind}) => kind === 'focus')?.id ?? null;
}

// Presses Tab (or another key) until the focus stands there.
export async function tabTo(visit, id, key = 'Tab') {
  const seen = [];
  for (let i = 0; i < 120; ++i) {
    const here = await focused(visit);
    if (here === id) return;
    seen.push(here);
    await visit.key(key);
  }
  assert.fail(`${key} never came to ${id}, but to ${seen.join(', ')}`);
}

// Opens the menu of the button that has the focus and picks an item by its words.
export async function pickByKeys(visit, words) {
  await visit.key('Enter');
  await visit.mark(`menu/${words}`);
  const items = (await visit.marks()).filter(({kind}) => kind === 'menuitem').map(({id}) => id);
  for (let i = 0; i < items.indexOf(`menu/${words}`); ++i) await visit.key('ArrowDown');
  await visit.key('Enter');
}
