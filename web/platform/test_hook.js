// What browser tests may ask: where widgets stand, what was drawn and kept. Nothing here changes the review.

window.rejoinderTest = Object.freeze({
  figures,
  marks() {
    program._watch_marks(1);
    drawNow();
    return JSON.parse(textAt(program._all_marks()));
  },
  frames: () => program._count_frames(),
  // A hidden page is given no frames, however many it wants.
  atRest: () => document.hidden || (ready && !frameIsComing),
  redraw: () => drawNow(),
  slot: () => slot,
  kept: () => shelf.all().then((entries) => entries.get(slot)?.text ?? null),
});
