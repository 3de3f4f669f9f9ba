// Copy, cut and paste by key or by the browser's menu, and by buttons in the drawing.

// The drawing has the keyboard, unless the reader works in the text region.
function drawingHasKeys() {
  const focused = document.activeElement;
  return ready && (focused === keyboard || focused === document.body) && getSelection().isCollapsed;
}

function pasteText(text) {
  withTexts([text], (address, size) => program._on_paste(address, size));
  answerInput(3);
}

document.addEventListener('paste', (event) => {
  if (!drawingHasKeys()) return;
  event.preventDefault();
  pasteText(event.clipboardData.getData('text/plain') || '');
});

for (const kind of ['copy', 'cut']) {
  document.addEventListener(kind, (event) => {
    if (!drawingHasKeys()) return;
    event.preventDefault();
    const text = textAt(program._on_copy(kind === 'cut' ? 1 : 0));
    if (text !== null) event.clipboardData.setData('text/plain', text);
    requestFrames(3);
  });
}

// For browsers that refuse the first way: a text area of the moment, copied as if by key.
function copyByCommand(text) {
  const area = document.createElement('textarea');
  area.value = text;
  document.body.append(area);
  area.select();
  const copied = document.execCommand('copy');
  area.remove();
  keyboard.focus({preventScroll: true});
  figures.copied = copied ? text : '';
}

host.copy = (text) => {
  if (!navigator.clipboard) {
    copyByCommand(text);
    return;
  }
  navigator.clipboard.writeText(text).then(() => {
    figures.copied = text;
  }, () => copyByCommand(text));
};

// ---- an address that carries a review: "#review=" and the text, deflated, in the URL's own base 64

const kLinkMark = '#review=';
const kLongestLinked = 20e6;  // characters after inflating; more is no review

async function throughStream(bytes, stream, limit = Infinity) {
  const reader = new Blob([bytes]).stream().pipeThrough(stream).getReader();
  const pieces = [];
  let size = 0;
  for (;;) {
    const {done, value} = await reader.read();
    if (done) break;
    size += value.length;
    if (size > limit) {
      reader.cancel();
      throw new RangeError('too long');
    }
    pieces.push(value);
  }
  return new Uint8Array(await new Blob(pieces).arrayBuffer());
}

async function linkFor(text) {
  const packed = await throughStream(new TextEncoder().encode(text), new CompressionStream('deflate-raw'));
  let binary = '';
  for (const byte of packed) binary += String.fromCharCode(byte);
  const letters = btoa(binary).replaceAll('+', '-').replaceAll('/', '_').replace(/=+$/, '');
  return location.href.replace(/#.*/, '') + kLinkMark + letters;
}

// The review that the page's address carries, "" for none or one that cannot be read.
async function linkedReview() {
  if (!location.hash.startsWith(kLinkMark)) return '';
  const letters = location.hash.slice(kLinkMark.length).replaceAll('-', '+').replaceAll('_', '/');
  // A reload must bring what was kept since, not the link again.
  history.replaceState(null, '', location.href.replace(/#.*/, ''));
  try {
    const packed = Uint8Array.from(atob(letters), (letter) => letter.charCodeAt(0));
    const bytes = await throughStream(packed, new DecompressionStream('deflate-raw'), kLongestLinked);
    return new TextDecoder().decode(bytes);
  } catch {
    host.announce('The address carries a review that cannot be read; it may have been cut short on its way.');
    return '';
  }
}

host.copyLink = (text) => {
  linkFor(text).then(host.copy);
};
