// The page around the compiled program: shared state, texts on their way in and out, drawing on demand.
//
// All scripts of this folder are joined into one by pack.mjs, in the order given in .setup/page.cmake, and share
// one scope. C++ calls functions of `host` (services.cc); the scripts call exported functions of `program` (input.cc).
const host = {};
let program = null;  // the compiled module, once it runs
let ready = false;   // the app has started and the canvas has a size: events may pass

const canvas = document.getElementById('drawing');
const keyboard = document.getElementById('keys');
const companion = document.getElementById('companion');
const picker = document.getElementById('picker');
const figures = {copied: '', downloads: [], report: '', writes: 0};  // read by tests alone

// ---- texts

// What C++ can hold: no zero bytes, no halves of surrogate pairs, line ends as "\n".
function cleaned(text) {
  return text.replace(/\r\n?/g, '\n').replace(/\0/g, '').replace(/\p{Surrogate}/gu, '\uFFFD');
}

// Copies a text into the program's memory; whoever receives the address frees it.
host.allocate = (text) => {
  const size = program.lengthBytesUTF8(text) + 1;
  const address = program._malloc(size);
  program.stringToUTF8(text, address, size);
  return address;
};

// Calls use(address, size, address, size, ...) with the texts in the program's memory.
function withTexts(texts, use) {
  const clean = texts.map(cleaned);
  const addresses = clean.map(host.allocate);
  try {
    return use(...clean.flatMap((text, i) => [addresses[i], program.lengthBytesUTF8(text)]));
  } finally {
    addresses.forEach((address) => program._free(address));
  }
}

// A text that the program returned; null for a null address.
function textAt(address) {
  return address ? program.UTF8ToString(address) : null;
}

// ---- drawing on demand

let framesWanted = 0;
let frameIsComing = false;
let tooltipTimer = 0;
const kCursors = ['default', 'text', 'move', 'ns-resize', 'ew-resize', 'nesw-resize', 'nwse-resize', 'pointer',
                  'not-allowed'];

function drawNow() {
  const waiting = program._on_frame();
  const changed = textAt(program._changed_companion());
  if (changed !== null) fillCompanion(changed);
  canvas.style.cursor = kCursors[program._wanted_cursor()] || 'default';
  keyboard.inputMode = program._text_is_wanted() ? 'text' : 'none';
  // ImGui spreads a burst of events over several frames.
  if (waiting > 0) framesWanted = Math.max(framesWanted, 2);
  return waiting;
}

function requestFrames(count) {
  if (!ready) return;
  framesWanted = Math.max(framesWanted, count);
  if (frameIsComing) return;
  frameIsComing = true;
  requestAnimationFrame(() => {
    frameIsComing = false;
    --framesWanted;
    fitCanvas();  // some changes of the pixel ratio come without any event
    drawNow();
    if (framesWanted > 0) requestFrames(framesWanted);
  });
}
host.requestFrames = requestFrames;

// Frames for input just received, and two more for the tooltip that appears when the pointer rests.
function answerInput(count) {
  requestFrames(count);
  clearTimeout(tooltipTimer);
  tooltipTimer = setTimeout(() => requestFrames(2), 700);
}

// ---- what stays on screen when nothing can be drawn

function showMessage(text) {
  const message = document.getElementById('message');
  message.textContent = text;
  message.hidden = false;
}

// ---- looks

const darkQuery = matchMedia('(prefers-color-scheme: dark)');
darkQuery.addEventListener('change', () => requestFrames(2));
host.prefersDark = () => darkQuery.matches;
host.setTheme = (dark) => {
  document.documentElement.dataset.theme = dark ? 'dark' : 'light';
};
host.setTitle = (text) => {
  document.title = text;
};

function twoDigits(number) {
  return String(number).padStart(2, '0');
}
function clockOf(date) {
  return `${twoDigits(date.getHours())}:${twoDigits(date.getMinutes())}`;
}
function localTime(date) {
  return `${date.getFullYear()}-${twoDigits(date.getMonth() + 1)}-${twoDigits(date.getDate())} ${clockOf(date)}`;
}
host.localTime = () => localTime(new Date());

// ---- the graphics card may be taken away, and given back

canvas.addEventListener('webglcontextlost', (event) => event.preventDefault());
canvas.addEventListener('webglcontextrestored', () => {
  program._on_restore();
  requestFrames(2);
});
