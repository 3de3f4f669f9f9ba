// Size of the canvas: CSS pixels for layout, device pixels for drawing.

let devicePixels = null;  // the browser's own count, where it gives one
let ratioUsed = 0;

function fitCanvas() {
  const ratio = window.devicePixelRatio || 1;
  const width = canvas.clientWidth;
  const height = canvas.clientHeight;
  if (!width || !height) return;
  let across = Math.round(width * ratio);
  let down = Math.round(height * ratio);
  // The browser's count is exact at odd zoom levels, but does not follow a pixel ratio that a test emulates.
  if (devicePixels && Math.abs(devicePixels.inlineSize - across) <= 2 && Math.abs(devicePixels.blockSize - down) <= 2) {
    across = devicePixels.inlineSize;
    down = devicePixels.blockSize;
  }
  if (across === canvas.width && down === canvas.height && ratio === ratioUsed) return;
  canvas.width = across;
  canvas.height = down;
  ratioUsed = ratio;
  program._on_resize(width, height, across / width);
  if (!ready) {
    ready = true;
    keyboard.focus({preventScroll: true});
  }
  drawNow();  // setting the size has emptied the canvas
  document.documentElement.dataset.ready = '1';
  requestFrames(2);
}

function watchSize() {
  const observer = new ResizeObserver((entries) => {
    const sizes = entries[entries.length - 1].devicePixelContentBoxSize;
    devicePixels = (sizes && sizes[0]) || null;
    fitCanvas();
  });
  try {
    observer.observe(canvas, {box: 'device-pixel-content-box'});
  } catch {
    observer.observe(canvas);
  }
  addEventListener('resize', fitCanvas);
  const watchRatio = () => {
    matchMedia(`(resolution: ${window.devicePixelRatio}dppx)`).addEventListener('change', () => {
      fitCanvas();
      watchRatio();
    }, {once: true});
  };
  watchRatio();
  fitCanvas();
}
