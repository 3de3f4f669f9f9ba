// Keys. A text area of one pixel holds the focus and takes everything typed: so input methods, dead keys and the
// clipboard work as in any text field, and single keys do not start the browser's quick find.

const kCtrl = 1, kShift = 2, kAlt = 4, kSuper = 8;
// With Ctrl or Cmd, these are ours; all others (find, print, tabs, zoom ...) stay the browser's.
const kCommands = /^([ayzso]|Home|End|Arrow(Left|Right|Up|Down)|Backspace|Delete|Enter|NumpadEnter|F1)$/;

const held = new Map();  // event.code -> name that went down, so that the same goes up whatever else is held by then
let nextTabLeaves = false;

function modifiersOf(event) {
  const altGraph = event.getModifierState('AltGraph');  // types a sign; some systems report it as Ctrl+Alt
  return (event.ctrlKey && !altGraph ? kCtrl : 0) | (event.shiftKey ? kShift : 0) |
      (event.altKey && !altGraph ? kAlt : 0) | (event.metaKey ? kSuper : 0);
}

// Letters by what the layout types, so that Ctrl+Z is where the keyboard says Z; by place where it types no Latin.
function keyName(event) {
  if (event.code === 'NumpadEnter') return 'NumpadEnter';
  if (/^[a-z]$/i.test(event.key)) return event.key.toLowerCase();
  if (/^Key[A-Z]$/.test(event.code) && event.key.length === 1) return event.code[3].toLowerCase();
  if (/^Digit\d$/.test(event.code)) return event.code[5];
  return event.key;
}

function passKey(name, down) {
  return withTexts([name], (address) => program._on_key(address, down)) !== 0;
}

function releaseAll() {
  held.forEach((name) => passKey(name, 0));
  held.clear();
  program._on_modifiers(0);
}

keyboard.addEventListener('keydown', (event) => {
  if (!ready || event.isComposing) return;
  const modifiers = modifiersOf(event);
  const name = keyName(event);
  const command = (modifiers & (kCtrl | kSuper)) !== 0;
  if (command && /^[cxv]$/.test(name)) return;  // the browser's copy, cut or paste event follows

  // Tab moves inside the drawing; Escape outside a text field lets the next Tab leave it.
  if (name === 'Tab' && nextTabLeaves) {
    nextTabLeaves = false;
    return;
  }
  if (name !== 'Shift') nextTabLeaves = name === 'Escape' && !program._text_is_wanted();

  program._on_modifiers(modifiers);
  if (!command || kCommands.test(name)) {
    const known = passKey(name, 1);
    if (known) held.set(event.code, name);
    // What types a sign must go on to become text.
    if (known && (command || event.key.length !== 1)) event.preventDefault();
  }
  answerInput(4);
});

keyboard.addEventListener('keyup', (event) => {
  if (!ready) return;
  const name = held.get(event.code);
  if (name !== undefined) passKey(name, 0);
  held.delete(event.code);
  // A Mac sends no keyup for letters while Cmd is held.
  if (event.key === 'Meta') releaseAll();
  program._on_modifiers(modifiersOf(event));
  requestFrames(3);
});

function passText(text) {
  if (!text) return;
  withTexts([text], (address) => program._on_text(address));
  answerInput(3);
}

keyboard.addEventListener('beforeinput', (event) => {
  if (!ready || event.isComposing) return;
  if (event.inputType === 'insertText') passText(event.data);
  if (event.cancelable) event.preventDefault();
});

keyboard.addEventListener('compositionend', (event) => {
  if (ready) passText(event.data);
  keyboard.value = '';
});

// Anything that got into the text area another way must not pile up there.
keyboard.addEventListener('input', (event) => {
  if (!event.isComposing) keyboard.value = '';
});

keyboard.addEventListener('focus', () => {
  if (!ready) return;
  program._on_focus(1);
  requestFrames(3);
});

keyboard.addEventListener('blur', () => {
  if (!ready) return;
  releaseAll();
  program._on_focus(0);
  requestFrames(3);
});

addEventListener('focus', () => {
  if (ready && document.activeElement === document.body) keyboard.focus({preventScroll: true});
});

// Where the drawing's text cursor stands, for the window of an input method.
host.placeCaret = (x, y, height) => {
  keyboard.style.left = `${Math.max(0, x)}px`;
  keyboard.style.top = `${Math.max(0, y)}px`;
  keyboard.style.height = `${Math.max(1, height)}px`;
};
