// Files in and out, new tabs, printing.

const kLargestFile = 20e6;  // bytes

async function openFile(file) {
  if (file.size > kLargestFile) {
    host.announce(`${file.name} is larger than a review can be.`);
    return;
  }
  const text = await file.text();
  withTexts([file.name, text], (name, nameSize, address, size) => program._on_file(name, address, size));
  requestFrames(4);
}

host.pickFile = () => picker.click();
picker.addEventListener('change', () => {
  if (picker.files[0]) openFile(picker.files[0]);
  picker.value = '';  // so that choosing the same file again counts as a change
  keyboard.focus({preventScroll: true});
});

addEventListener('dragover', (event) => event.preventDefault());
addEventListener('drop', (event) => {
  event.preventDefault();
  if (!ready) return;
  const file = event.dataTransfer.files[0];
  const text = event.dataTransfer.getData('text/plain');
  if (file) openFile(file);
  else if (text) pasteText(text);
});

function saveBlob(name, blob) {
  const address = URL.createObjectURL(blob);
  const link = document.createElement('a');
  link.href = address;
  link.download = name;
  document.body.append(link);
  link.click();
  link.remove();
  figures.downloads.push({name, type: blob.type, size: blob.size});
  setTimeout(() => URL.revokeObjectURL(address), 30000);
}

host.download = (name, type, text) => saveBlob(name, new Blob([text], {type: `${type};charset=utf-8`}));

host.downloadPng = (name, svg, scale) => {
  const address = URL.createObjectURL(new Blob([svg], {type: 'image/svg+xml'}));
  const picture = new Image();
  picture.onload = () => {
    const sheet = document.createElement('canvas');
    sheet.width = Math.round(picture.width * scale);
    sheet.height = Math.round(picture.height * scale);
    const pen = sheet.getContext('2d');
    pen.scale(scale, scale);
    pen.drawImage(picture, 0, 0);
    URL.revokeObjectURL(address);
    sheet.toBlob((blob) => saveBlob(name, blob), 'image/png');
  };
  picture.src = address;
};

host.openReport = (html) => {
  const address = URL.createObjectURL(new Blob([html], {type: 'text/html;charset=utf-8'}));
  const opened = window.open(address, '_blank');
  figures.report = opened ? address : '';
  if (!opened) host.announce('The browser did not open a new tab for the report; save it as a file instead.');
};

// Later, as printing blocks the page until the reader has answered.
host.print = () => setTimeout(() => window.print(), 0);
