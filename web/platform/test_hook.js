// What browser tests may ask: where widgets stand, how many frames were drawn. Nothing here changes the review.

window.rejoinderTest = Object.freeze({
  figures,
  marks() {
    program._watch_marks(1);
    drawNow();
    return JSON.parse(textAt(program._all_marks()));
  },
  frames: () => program._count_frames(),
  slot: () => slot,
  kept: () => shelf.all().then((entries) => entries.get(slot)?.text ?? null),
});
