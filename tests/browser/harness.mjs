// What a browser test is written with: test(), open(), and a Visit that points, types and reads as a person would.
//
//   test('a paste becomes a table', async (t) => {
//     const visit = await t.open('rejoinder.html');
//     await visit.paste('x\t1.2');
//     await visit.waitForText('1.2');
//   });
//
// Every test has a browser profile of its own. Nothing waits for a fixed time: each step waits for what it causes,
// and a test whose page met a fault of its own, or asked for anything but its file, is counted as failed.
import assert from 'node:assert/strict';
import {mkdirSync} from 'node:fs';
import {join, resolve} from 'node:path';
import {fileURLToPath, pathToFileURL} from 'node:url';

const top = resolve(fileURLToPath(import.meta.url), '../../..');
export const pageFolder = process.env.REJOINDER_WEB_BUILD || join(top, 'build/web');
const screenshotFolder = join(pageFolder, '../screenshots');
const kPatience = 15000;  // milliseconds before a wait gives up

export const tests = [];
let currentFile = '';
export function setCurrentFile(name) {
  currentFile = name;
}
export function test(name, run) {
  tests.push({file: currentFile, name, run});
}

// The context of one test.
export class Trial {
  constructor(browser) {
    this.browser = browser;
    this.visits = [];
  }

  // A fresh profile: storage and clipboard permission of its own.
  async profile() {
    return this.own ??= await this.browser.createBrowserContext();
  }

  // Opens a file of the page's build folder, offline.
  //   width, height: CSS pixels; ratio: device pixels for each; dark: the reader's system asks for dark
  //   fragment: "#..." of the address; beforehand: a function run in the page before its scripts
  //   online: let the browser reach the network, so that a test can see that the page does not
  async open(file, {width = 1280, height = 800, ratio = 1, dark = false, fragment = '', beforehand, ready = true,
                    online = false} = {}) {
    const page = await (await this.profile()).newPage();
    const visit = new Visit(page);
    this.visits.push(visit);
    await page.setViewport({width, height, deviceScaleFactor: ratio});
    await page.emulateMediaFeatures([{name: 'prefers-color-scheme', value: dark ? 'dark' : 'light'}]);
    await page.setOfflineMode(!online);
    if (beforehand) await page.evaluateOnNewDocument(beforehand);
    await page.goto(pathToFileURL(join(pageFolder, file)).href + fragment);
    if (ready) await visit.waitUntilReady();
    return visit;
  }

  async close() {
    await this.own?.close();
  }
}

export class Visit {
  constructor(page) {
    this.page = page;
    this.requests = [];
    this.faults = [];
    page.setDefaultTimeout(kPatience);
    page.on('request', (request) => this.requests.push(request.url()));
    page.on('pageerror', (fault) => this.faults.push(String(fault)));
    page.on('console', (message) => {
      if (message.type() === 'error') this.faults.push(message.text());
    });
  }

  // ---- waiting

  async waitUntilReady() {
    await this.page.waitForFunction(() => document.documentElement.dataset.ready === '1' ||
                                          !document.getElementById('message').hidden);
    const message = await this.page.$eval('#message', (element) => element.hidden ? '' : element.textContent);
    assert.equal(message, '', 'the page shows a message in place of its drawing');
    await this.rest();
  }

  frames() {
    return this.page.evaluate(() => window.rejoinderTest.frames());
  }

  // Until no frame is being asked for.
  async rest() {
    await this.page.waitForFunction(() => window.rejoinderTest.atRest(), {polling: 10});
  }

  async waitFor(condition, ...values) {
    return this.page.waitForFunction(condition, {polling: 50}, ...values);
  }

  // ---- pointing

  async marks() {
    return this.page.evaluate(() => window.rejoinderTest.marks());
  }

  // Where the widget stands, once it is there and in sight.
  async mark(id) {
    const found = await this.page.waitForFunction((wanted) => {
      const mark = window.rejoinderTest.marks().find((each) => each.id === wanted);
      return mark && mark.w > 0 && mark.h > 0 ? mark : null;
    }, {polling: 50}, id).catch(async () => {
      const known = (await this.marks()).map((each) => each.id).join(', ');
      throw new Error(`no widget "${id}" in sight; there are: ${known}`);
    });
    return found.jsonValue();
  }

  async moveTo(x, y) {
    await this.page.mouse.move(x, y);
    await this.rest();
  }

  // across, down: where in the widget, as shares of its size
  async hover(id, {across = 0.5, down = 0.5} = {}) {
    const mark = await this.mark(id);
    await this.moveTo(mark.x + mark.w * across, mark.y + mark.h * down);
  }

  async press() {
    await this.page.mouse.down();
    await this.rest();
  }

  async release() {
    await this.page.mouse.up();
    await this.rest();
  }

  async click(id, place) {
    await this.hover(id, place);
    await this.press();
    await this.release();
  }

  async doubleClick(id, place) {
    await this.hover(id, place);
    for (const count of [1, 2]) {
      await this.page.mouse.down({clickCount: count});
      await this.page.mouse.up({clickCount: count});
    }
    await this.rest();
  }

  async drag(id, byX, byY) {
    await this.hover(id);
    const mark = await this.mark(id);
    await this.press();
    await this.moveTo(mark.x + mark.w / 2 + byX, mark.y + mark.h / 2 + byY);
    await this.release();
  }

  // Turns the mouse wheel where the mouse is.
  async wheel(down) {
    const before = await this.frames();
    await this.page.mouse.wheel({deltaY: down});
    await this.waitFor((count) => window.rejoinderTest.frames() > count, before);
    await this.rest();
  }

  // ---- typing

  async type(text) {
    await this.page.keyboard.type(text);
    await this.rest();
  }

  // "Enter", "Shift+Tab", "Control+z": real keys, the last one pressed while the others are held.
  async key(combination) {
    const keys = combination === '+' ? ['+'] : combination.split('+');
    const last = keys.pop();
    for (const key of keys) await this.page.keyboard.down(key);
    await this.page.keyboard.press(last);
    for (const key of keys.reverse()) await this.page.keyboard.up(key);
    await this.rest();
  }

  // Puts the text on the real clipboard, from a tab of its own.
  async setClipboard(text) {
    const desk = await this.page.browserContext().newPage();
    await desk.evaluate((value) => {
      const area = document.createElement('textarea');
      document.body.append(area);
      area.value = value;
      area.select();
    }, text);
    await pressCommand(desk, 'c', 'copy');
    await desk.close();
    await this.page.bringToFront();
  }

  async clipboard() {
    const desk = await this.page.browserContext().newPage();
    await desk.evaluate(() => {
      const area = document.createElement('textarea');
      document.body.append(area);
      area.focus();
    });
    await pressCommand(desk, 'v', 'paste');
    await desk.waitForFunction(() => document.querySelector('textarea').value !== '');
    const text = await desk.$eval('textarea', (area) => area.value);
    await desk.close();
    await this.page.bringToFront();
    return text;
  }

  // Ctrl+V with that text on the clipboard.
  async paste(text) {
    await this.setClipboard(text);
    await pressCommand(this.page, 'v', 'paste');
    await this.rest();
  }

  // Ctrl+C, or Ctrl+X; what the page put on the clipboard.
  async copy({cut = false} = {}) {
    await pressCommand(this.page, cut ? 'x' : 'c', cut ? 'cut' : 'copy');
    await this.rest();
    return this.clipboard();
  }

  // ---- reading

  // The findings as text; with an id, of that part alone (the id that the program gave it).
  async text(id) {
    return this.page.evaluate((part) => {
      return (document.getElementById(part ? `text-${part}` : 'findings'))?.textContent ?? null;
    }, id);
  }

  // wanted: words that must come, or a regular expression
  async waitForText(wanted, id) {
    const pattern = wanted instanceof RegExp ? [wanted.source, wanted.flags] : null;
    await this.waitFor((words, expression, part) => {
      const text = document.getElementById(part ? `text-${part}` : 'findings')?.textContent ?? '';
      return expression ? new RegExp(...expression).test(text) : text.includes(words);
    }, String(wanted), pattern, id ?? '').catch(async () => {
      throw new Error(`"${wanted}" did not come; the text is: ${await this.text(id)}`);
    });
  }

  // The text kept in the browser's storage for this page, once it is `wanted` (a function of it is true).
  async waitForKept(wanted) {
    const deadline = Date.now() + kPatience;
    for (;;) {
      const kept = await this.page.evaluate(() => window.rejoinderTest.kept());
      if (kept !== null && wanted(kept)) return kept;
      if (Date.now() > deadline) throw new Error(`what is kept stays: ${kept}`);
    }
  }

  async reload() {
    await this.page.reload();
    await this.waitUntilReady();
  }

  // Device pixels of the canvas.
  backing() {
    return this.page.$eval('#drawing', (canvas) => ({width: canvas.width, height: canvas.height}));
  }

  // build/screenshots/NAME.png
  async screenshot(name) {
    mkdirSync(screenshotFolder, {recursive: true});
    const path = join(screenshotFolder, `${name}.png`);
    await this.page.screenshot({path});
    return path;
  }

  // How many different colours stand in the middle of the page: a blank drawing has one.
  async colours() {
    const {width, height} = await this.backing();
    return this.page.evaluate((across, down) => {
      const canvas = document.getElementById('drawing');
      const sheet = new OffscreenCanvas(across, down).getContext('2d');
      window.rejoinderTest.redraw();  // the browser empties the canvas once it is shown
      sheet.drawImage(canvas, 0, 0);
      return new Set(new Uint32Array(sheet.getImageData(0, 0, across, down).data.buffer)).size;
    }, width, height);
  }
}

// Headless browsers leave the clipboard to the editing command that the key stands for.
async function pressCommand(page, key, command) {
  await page.keyboard.down('Control');
  await page.keyboard.press(key, {commands: [command]});
  await page.keyboard.up('Control');
}
