// Mouse, pen and touch on the canvas.

function passPointer(event) {
  const box = canvas.getBoundingClientRect();
  program._on_pointer(event.clientX - box.left, event.clientY - box.top, event.pointerType === 'touch' ? 1 : 0);
}

canvas.addEventListener('pointerdown', (event) => {
  if (!ready) return;
  event.preventDefault();
  passPointer(event);
  canvas.setPointerCapture(event.pointerId);
  program._on_button(event.button, 1);
  keyboard.focus({preventScroll: true});
  answerInput(4);
});

canvas.addEventListener('pointermove', (event) => {
  if (!ready) return;
  passPointer(event);
  answerInput(2);
});

canvas.addEventListener('pointerup', (event) => {
  if (!ready) return;
  passPointer(event);
  program._on_button(event.button, 0);
  // Drawn at once, so that what a button does (picker, clipboard, new tab) still counts as the reader's own doing.
  for (let i = 0; i < 4 && drawNow() > 0; ++i);
  answerInput(4);
});

canvas.addEventListener('pointercancel', (event) => {
  if (!ready) return;
  program._on_button(event.button < 0 ? 0 : event.button, 0);
  requestFrames(3);
});

canvas.addEventListener('pointerleave', () => {
  if (!ready) return;
  program._on_pointer(-3e38, -3e38, 0);  // ImGui's sign for "nowhere"
  requestFrames(2);
});

canvas.addEventListener('wheel', (event) => {
  if (!ready || event.ctrlKey) return;  // with Ctrl it is the browser's zoom
  event.preventDefault();
  const unit = event.deltaMode === 1 ? 1 / 3 : event.deltaMode === 2 ? 3 : 1 / 100;
  program._on_wheel(-event.deltaX * unit, -event.deltaY * unit);
  answerInput(3);
}, {passive: false});

canvas.addEventListener('contextmenu', (event) => event.preventDefault());
