// The platform on its own, by the small app of platform_trial.cc.
import assert from 'node:assert/strict';
import {readFileSync} from 'node:fs';
import {createServer} from 'node:http';
import {join} from 'node:path';
import {pageFolder, test} from './harness.mjs';

const kTrial = 'platform_trial.html';
const openTrial = (t, options = {}) => t.open(kTrial, {width: 900, height: 500, ...options});

test('the page starts from disk, draws, and asks for nothing but its own file', async (t) => {
  const visit = await openTrial(t);
  assert.ok(await visit.colours() > 10, 'the drawing is blank');
  await visit.screenshot('platform_trial');
  assert.equal(visit.requests.length, 1);
  assert.match(visit.requests[0], /^file:.*platform_trial\.html$/);
});

test('the policy stands before all scripts and forbids every request', async () => {
  const html = readFileSync(join(pageFolder, kTrial), 'utf8');
  const policy = html.match(/Content-Security-Policy" content="([^"]*)"/)[1];
  for (const rule of ["default-src 'none'", "connect-src 'none'", "form-action 'none'", "base-uri 'none'"]) {
    assert.ok(policy.includes(rule), rule);
  }
  assert.doesNotMatch(policy, /script-src[^;]*unsafe-inline/);
  assert.ok(html.indexOf('Content-Security-Policy') < html.indexOf('<script'), 'the policy must come before scripts');

});

test('no way out of the page reaches a server', async (t) => {
  let reached = 0;
  const server = createServer((request, response) => {
    ++reached;
    response.end();
  });
  await new Promise((resolve) => server.listen(0, '127.0.0.1', resolve));
  const address = `http://127.0.0.1:${server.address().port}/`;
  try {
    await fetch(address);
    assert.equal(reached, 1, 'the server must count what does reach it');
    const visit = await openTrial(t, {online: true});
    await visit.page.evaluate(async (target) => {
      const refused = new Set();
      document.addEventListener('securitypolicyviolation', (event) => refused.add(event.effectiveDirective));
      const add = (name, properties) => document.body.append(Object.assign(document.createElement(name), properties));
      fetch(target).catch(() => {});
      navigator.sendBeacon(target, 'x');
      try {
        new WebSocket(target.replace('http', 'ws'));
      } catch {
        // refused at once
      }
      add('img', {src: target});
      add('script', {src: target});
      add('link', {rel: 'stylesheet', href: target});
      add('iframe', {src: target});
      const form = document.createElement('form');
      form.action = target;
      document.body.append(form);
      form.submit();
      const wanted = ['connect-src', 'img-src', 'script-src-elem', 'style-src-elem', 'frame-src', 'form-action'];
      while (wanted.some((directive) => !refused.has(directive))) await new Promise((resolve) => setTimeout(resolve, 20));
    }, address);
    assert.equal(reached, 1);
    visit.faults.length = 0;  // the browser logs each refusal
  } finally {
    server.close();
  }
});

test('an altered copy of the page\'s own script does not run', async (t) => {
  const visit = await openTrial(t);
  const ran = await visit.page.evaluate(() => {
    const copy = document.createElement('script');
    copy.textContent = [...document.scripts].at(-1).textContent + ';window.ranAltered = true';
    document.body.append(copy);
    return window.ranAltered === true;
  });
  assert.equal(ran, false);
  visit.faults.length = 0;  // the browser logs the refusal
});

test('nothing is drawn while nothing happens, with a text field active too', async (t) => {
  const visit = await openTrial(t);
  for (const active of [false, true]) {
    if (active) await visit.click('short');
    // The frames for tooltips come 0.7 s after the last input; from then on there must be none.
    await visit.page.evaluate(() => new Promise((resolve) => setTimeout(resolve, 900)));
    await visit.rest();
    const before = await visit.frames();
    await visit.page.evaluate(() => new Promise((resolve) => setTimeout(resolve, 2000)));
    assert.equal(await visit.frames(), before);
  }
});

test('a moving pointer is answered by a few frames', async (t) => {
  const visit = await openTrial(t);
  await visit.moveTo(300, 300);
  const before = await visit.frames();
  await visit.moveTo(310, 300);
  const drawn = await visit.frames() - before;
  assert.ok(drawn >= 1 && drawn <= 8, `${drawn} frames`);
});

test('work that an app does in slices gets its frames, and then they stop', async (t) => {
  const visit = await openTrial(t);
  const before = await visit.frames();
  await visit.click('work');
  await visit.rest();
  assert.ok(await visit.frames() - before >= 20);
});

test('the canvas has one pixel for each of the screen', async (t) => {
  for (const ratio of [1, 1.25, 1.5, 2, 3]) {
    const visit = await openTrial(t, {width: 901, height: 503, ratio});
    const {width, height} = await visit.backing();
    assert.ok(Math.abs(width - 901 * ratio) <= 1, `${width} at ${ratio}`);
    assert.ok(Math.abs(height - 503 * ratio) <= 1, `${height} at ${ratio}`);
    if (ratio === 2) await visit.screenshot('platform_trial_2x');
  }
});

test('the drawing follows the window and the pixel ratio', async (t) => {
  const visit = await openTrial(t, {width: 800, height: 600});
  await visit.page.setViewport({width: 1000, height: 700, deviceScaleFactor: 1});
  await visit.waitFor(() => document.getElementById('drawing').width === 1000);
  await visit.page.setViewport({width: 1000, height: 700, deviceScaleFactor: 2});
  await visit.moveTo(50, 50);
  await visit.waitFor(() => document.getElementById('drawing').width === 2000);
  await visit.rest();
  assert.ok(await visit.colours() > 10);
});

test('typing reaches the text field, accents and Greek too', async (t) => {
  const visit = await openTrial(t);
  await visit.click('short');
  await visit.type('fare = 0, aé ß β −');
  await visit.waitForText('fare = 0, aé ß β −', 'short');
  await visit.key('Control+a');
  await visit.key('Backspace');
  await visit.type('x');
  await visit.waitForText(/^x$/, 'short');
});

test('a long burst of typing loses nothing', async (t) => {
  const visit = await openTrial(t);
  await visit.click('long');
  const text = 'A joint test, checked in haste: F(2, 410) = 4.21, p = .015. ';
  await visit.type(text);
  await visit.waitForText(text, 'long');
});

test('text from an input method arrives whole', async (t) => {
  const visit = await openTrial(t);
  await visit.click('short');
  const session = await visit.page.createCDPSession();
  await session.send('Input.imeSetComposition', {text: 'か', selectionStart: 1, selectionEnd: 1});
  await session.send('Input.insertText', {text: 'ŵ'});
  await visit.waitForText('ŵ', 'short');
  assert.equal(await visit.text('short'), 'ŵ');
});

test('our key combinations reach the app, and the others are left to the browser', async (t) => {
  const visit = await openTrial(t);
  await visit.key('Control+z');
  await visit.waitForText(/^1$/, 'undo');
  await visit.key('ArrowRight');
  await visit.waitForText(/^1$/, 'moves');
  const kept = await visit.page.evaluate(() => {
    const seen = (key, options) => keyEvent(key, options).defaultPrevented;
    const keyEvent = (key, options) => {
      const event = new KeyboardEvent('keydown', {key, bubbles: true, cancelable: true, ...options});
      document.getElementById('keys').dispatchEvent(event);
      return event;
    };
    return {
      find: seen('f', {ctrlKey: true, code: 'KeyF'}), close: seen('w', {ctrlKey: true, code: 'KeyW'}),
      zoom: seen('+', {ctrlKey: true, code: 'Equal'}), undo: seen('z', {ctrlKey: true, code: 'KeyZ'}),
      save: seen('s', {ctrlKey: true, code: 'KeyS'}), open: seen('o', {ctrlKey: true, code: 'KeyO'}),
      redo: seen('y', {ctrlKey: true, code: 'KeyY'}), tab: seen('Tab', {code: 'Tab'}),
    };
  });
  assert.deepEqual(kept, {find: false, close: false, zoom: false, undo: true, save: true, open: true, redo: true, tab: true});
});

test('a key released elsewhere does not stay down', async (t) => {
  const visit = await openTrial(t);
  await visit.page.keyboard.down('ArrowRight');
  await visit.waitForText(/^1$/, 'moves');
  await visit.page.evaluate(() => document.getElementById('keys').blur());
  await visit.page.keyboard.up('ArrowRight');
  await visit.page.evaluate(() => document.getElementById('keys').focus());
  for (let i = 0; i < 10; ++i) await visit.moveTo(100 + i, 400);
  assert.equal(await visit.text('moves'), '1');
});

test('Tab stays inside the drawing; Escape, then Tab, leads to the text, and Escape back', async (t) => {
  const visit = await openTrial(t);
  const focused = () => visit.page.evaluate(() => document.activeElement.id);
  await visit.key('Tab');
  await visit.key('Tab');
  assert.equal(await focused(), 'keys');
  await visit.key('Escape');
  await visit.key('Escape');
  await visit.key('Tab');
  assert.equal(await focused(), 'companion');
  assert.ok(await visit.page.$eval('#companion', (element) => element.getBoundingClientRect().width > 200));
  await visit.key('Escape');
  assert.equal(await focused(), 'keys');
});

test('a paste outside text fields goes to the app, inside one into its text, byte for byte', async (t) => {
  const visit = await openTrial(t);
  const table = 'fare\t−0.231***\t(0.060)\nβ₁ ≤ “x”\té';
  await visit.paste(table);
  await visit.waitForText(table, 'pasted');
  await visit.click('long');
  const lines = 'β₁ ≤ “x”\n− é';
  await visit.paste(lines);
  await visit.waitForText(lines, 'long');
});

test('copy and cut put the chosen text on the clipboard, or what the app offers', async (t) => {
  const visit = await openTrial(t);
  assert.equal(await visit.copy(), 'copied from the app');
  await visit.click('short');
  await visit.type('p = .015');
  await visit.key('Control+a');
  assert.equal(await visit.copy(), 'p = .015');
  assert.equal(await visit.copy({cut: true}), 'p = .015');
  assert.equal(await visit.text('short'), '');
});

test('a button can copy', async (t) => {
  const visit = await openTrial(t);
  await visit.click('copy');
  await visit.waitFor(() => window.rejoinderTest.figures.copied !== '');
  assert.equal(await visit.clipboard(), 'from the button: β ≤ −1');
});

test('what is typed is kept, with the time, and comes back after a reload', async (t) => {
  const visit = await openTrial(t);
  await visit.click('long');
  await visit.type('kept text β');
  await visit.waitForKept((text) => text === 'kept text β');
  await visit.waitForText(/^\d\d:\d\d$/, 'kept');
  await visit.reload();
  assert.equal(await visit.text('long'), 'kept text β');
});

test('a page left at once after typing loses nothing', async (t) => {
  const visit = await openTrial(t);
  await visit.click('long');
  await visit.page.keyboard.type('in haste');
  await visit.waitForText('in haste', 'long');
  await visit.reload();
  assert.equal(await visit.text('long'), 'in haste');
});

test('two windows keep two reviews, and a window opened later takes up the latest one left', async (t) => {
  const first = await openTrial(t);
  await first.click('long');
  await first.type('paper one');
  await first.waitForKept((text) => text === 'paper one');
  const second = await openTrial(t);
  assert.equal(await second.text('long'), '');
  assert.equal(await second.text('others'), '1');
  await second.click('long');
  await second.type('paper two');
  await second.waitForKept((text) => text === 'paper two');
  await first.page.bringToFront();
  await first.reload();
  assert.equal(await first.text('long'), 'paper one');
  await second.page.close();
  const third = await openTrial(t);
  assert.equal(await third.text('long'), 'paper two');
});

test('an empty review can be begun beside the kept one', async (t) => {
  const visit = await openTrial(t);
  await visit.click('long');
  await visit.type('older');
  await visit.waitForKept((text) => text === 'older');
  await Promise.all([visit.page.waitForNavigation(), visit.click('new').catch(() => {})]);
  await visit.waitUntilReady();
  assert.equal(await visit.text('long'), '');
  assert.equal(await visit.text('others'), '1');
});

test('a kept text that cannot be read is set aside, not overwritten', async (t) => {
  const visit = await openTrial(t);
  await visit.click('long');
  await visit.type('unreadable');
  await visit.waitForKept((text) => text === 'unreadable');
  await visit.reload();
  assert.equal(await visit.text('long'), 'fresh');
  const aside = await visit.page.evaluate(() => new Promise((resolve) => {
    indexedDB.open('rejoinder').onsuccess = (event) => {
      const request = event.target.result.transaction('aside').objectStore('aside').getAll();
      request.onsuccess = () => resolve(request.result.map((entry) => entry.text));
    };
  }));
  assert.deepEqual(aside, ['unreadable']);
});

test('without IndexedDB the text is kept all the same', async (t) => {
  const beforehand = () => {
    IDBFactory.prototype.open = () => {
      throw new Error('shut off');
    };
  };
  const visit = await openTrial(t, {beforehand});
  await visit.click('long');
  await visit.type('plain');
  await visit.waitForKept((text) => text === 'plain');
  await visit.reload();
  assert.equal(await visit.text('long'), 'plain');
});

test('a link carries the review, and displaces nothing', async (t) => {
  const visit = await openTrial(t);
  await visit.click('long');
  await visit.type('linked β ≤ 1');
  await visit.waitForKept((text) => text === 'linked β ≤ 1');
  await visit.click('link');
  await visit.waitFor(() => window.rejoinderTest.figures.copied.includes('#review='));
  const link = await visit.clipboard();
  const fragment = link.slice(link.indexOf('#'));
  assert.match(fragment, /^#review=[\w-]+$/);
  await visit.page.close();

  const other = await openTrial(t, {fragment});
  assert.equal(await other.text('long'), 'linked β ≤ 1');
  assert.equal(await other.text('others'), '1');
  assert.equal(await other.page.evaluate(() => location.hash), '');
});

test('a link cut short says so and opens what was kept', async (t) => {
  const visit = await openTrial(t, {fragment: '#review=7ZEx'});
  assert.match(await visit.page.$eval('#announcement', (element) => element.textContent), /cut short/);
  assert.equal(await visit.text('long'), '');
});

test('files can be opened, dropped and saved', async (t) => {
  const visit = await openTrial(t);
  const chooser = visit.page.waitForFileChooser();
  await visit.click('open');
  await (await chooser).accept([join(import.meta.dirname ?? new URL('.', import.meta.url).pathname, 'package.json')]);
  await visit.waitForText('package.json', 'file');
  await visit.waitForText('rejoinder-browser-tests', 'long');

  await visit.page.evaluate(() => {
    const transfer = new DataTransfer();
    transfer.items.add(new File(['dropped\r\ntext'], 'paper.toml'));
    window.dispatchEvent(new DragEvent('drop', {dataTransfer: transfer, bubbles: true, cancelable: true}));
  });
  await visit.waitForText('paper.toml', 'file');
  assert.equal(await visit.text('long'), 'dropped\ntext');

  await visit.click('save');
  await visit.click('picture');
  await visit.waitFor(() => window.rejoinderTest.figures.downloads.length === 2);
  const saved = await visit.page.evaluate(() => window.rejoinderTest.figures.downloads);
  assert.equal(saved[0].name, 'trial.toml');
  assert.equal(saved[0].size, 'dropped\ntext'.length);
  assert.deepEqual([saved[1].name, saved[1].type], ['trial.png', 'image/png']);
});

test('a report opens in its own tab, with its styles and without scripts', async (t) => {
  const visit = await openTrial(t);
  const opened = new Promise((resolve) => visit.page.once('popup', resolve));
  await visit.click('report');
  const report = await opened;
  await report.waitForSelector('p');
  assert.equal(await report.$eval('p', (element) => getComputedStyle(element).color), 'rgb(1, 2, 3)');
  assert.notEqual(await report.title(), 'run');
});

test('only words, tables and their like come into the text region', async (t) => {
  const visit = await openTrial(t);
  await visit.click('unsafe');
  const part = await visit.page.$eval('#text-unsafe', (element) => element.outerHTML);
  assert.equal(part, '<p id="text-unsafe">wordskept</p>');
  assert.notEqual(await visit.page.title(), 'run');
  await visit.click('short');
  await visit.type('<b onclick="x">&amp;');
  await visit.waitForText('<b onclick="x">&amp;', 'short');
  visit.faults.length = 0;  // the browser logs what it refused
});

test('the text region prints, and stands in the accessibility tree', async (t) => {
  const visit = await openTrial(t);
  await visit.click('short');
  await visit.type('printed words');
  await visit.waitForText('printed words', 'short');
  const tree = JSON.stringify(await visit.page.accessibility.snapshot({interestingOnly: false}));
  assert.ok(tree.includes('printed words'));
  await visit.page.emulateMediaType('print');
  const shown = await visit.page.evaluate(() => ({
    text: document.getElementById('companion').getBoundingClientRect().height > 50,
    canvas: getComputedStyle(document.getElementById('drawing')).display,
  }));
  assert.deepEqual(shown, {text: true, canvas: 'none'});
});

test('a button shows the text beside the drawing, and hides it', async (t) => {
  const visit = await openTrial(t);
  await visit.click('companion');
  await visit.waitFor(() => document.getElementById('companion').classList.contains('shown'));
  await visit.page.click('#hide-companion');
  await visit.waitFor(() => !document.getElementById('companion').classList.contains('shown'));
});

test('text can be made larger, up to a high pixel ratio', async (t) => {
  const visit = await openTrial(t, {ratio: 3});
  const before = await visit.mark('copy');
  await visit.click('larger');
  const after = await visit.mark('copy');
  assert.ok(after.w > before.w * 1.5, `${before.w} became ${after.w}`);
  assert.ok(await visit.colours() > 10);
});

test('the drawing comes back after the graphics card was taken away', async (t) => {
  const visit = await openTrial(t);
  await visit.page.evaluate(() => {
    const card = document.getElementById('drawing').getContext('webgl2').getExtension('WEBGL_lose_context');
    window.card = card;
    card.loseContext();
  });
  await visit.waitFor(() => document.getElementById('drawing').getContext('webgl2').isContextLost());
  await visit.page.evaluate(() => window.card.restoreContext());
  await visit.waitFor(() => !document.getElementById('drawing').getContext('webgl2').isContextLost());
  await visit.moveTo(200, 200);
  assert.ok(await visit.colours() > 10, 'the drawing is blank');
  visit.faults.length = 0;
});

test('a browser without WebGL 2 is told so in words', async (t) => {
  const visit = await openTrial(t, {
    ready: false,
    beforehand: () => {
      const own = HTMLCanvasElement.prototype.getContext;
      HTMLCanvasElement.prototype.getContext = function(kind, ...rest) {
        return kind.startsWith('webgl') ? null : own.call(this, kind, ...rest);
      };
    },
  });
  await visit.waitFor(() => !document.getElementById('message').hidden);
  assert.match(await visit.page.$eval('#message', (element) => element.textContent), /WebGL 2/);
});

test('the theme reaches the text region', async (t) => {
  const visit = await openTrial(t, {dark: true});
  const paper = () => visit.page.evaluate(() => getComputedStyle(document.body).backgroundColor);
  const light = await paper();
  await visit.click('dark');
  assert.notEqual(await paper(), light);
});
