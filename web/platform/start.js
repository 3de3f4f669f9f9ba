// Unpacks the compiled program, starts it and hands it what was kept.

async function unpackProgram() {
  const letters = document.getElementById('program').textContent;
  const packed = Uint8Array.from(atob(letters), (letter) => letter.charCodeAt(0));
  return throughStream(packed, new DecompressionStream('deflate-raw'));
}

function beginApp(kept, linked, others) {
  for (const other of others) {
    withTexts([other.slot, other.keptAt, other.text],
              (name, nameSize, time, timeSize, text, size) => program._begin_other(name, time, text, size));
  }
  const onMac = /Mac|iP(hone|ad)/.test(navigator.platform) ? 1 : 0;
  return withTexts([kept, linked], (...places) => program._begin(...places, onMac)) !== 0;
}

async function start() {
  if (!('WebAssembly' in window) || !('DecompressionStream' in window)) {
    showMessage('This page needs a browser of 2023 or later.');
    return;
  }
  program = await createRejoinder({
    wasmBinary: await unpackProgram(),
    host,
    onAbort: () => showMessage('The page has stopped. What you typed is kept on this machine: reload to go on.'),
  });
  if (!program._canvas_is_open()) {
    showMessage('This browser offers no WebGL 2, which the page needs to draw.');
    return;
  }
  const linked = await linkedReview();
  const {kept, others} = await openStorage(linked !== '');
  if (!beginApp(kept, linked, others)) await setAside(kept);
  watchSize();
}

start().catch(() => showMessage('The page could not start in this browser.'));
