// The page at the sizes and in the themes it is made for: crisp, and pictures of each to look at.
import assert from 'node:assert/strict';
import {test} from './harness.mjs';
import {openPage} from './workbench.mjs';

test('the drawing is crisp at pixel ratios 1 and 2', async (t) => {
  for (const ratio of [1, 2]) {
    const visit = await openPage(t, {width: 1440, height: 900, ratio});
    assert.deepEqual(await visit.backing(), {width: 1440 * ratio, height: 900 * ratio});
    await visit.screenshot(`look_1440@${ratio}`);
    await visit.page.close();
  }
});

// Each in a profile of its own: what is kept of one visit decides the next one's theme.
for (const width of [1440, 700]) {
  for (const look of ['light', 'dark']) {
    test(`the page draws ${width} wide, ${look}`, async (t) => {
      const visit = await openPage(t, {width, height: 900, dark: look === 'dark'});
      assert.ok(await visit.colours() > 10, 'the drawing is blank');
      const ground = await visit.page.evaluate(() => getComputedStyle(document.body).backgroundColor);
      const [red] = ground.match(/\d+/g).map(Number);
      assert.equal(red < 128 ? 'dark' : 'light', look, ground);
      const tabs = width < 1000 ? ['paper', 'claims', 'allows'] : [];
      for (const tab of tabs) {
        await visit.click(`tab/${tab}`);
        await visit.screenshot(`look_${width}_${look}_${tab}`);
      }
      if (!tabs.length) await visit.screenshot(`look_${width}_${look}`);
    });
  }
}
