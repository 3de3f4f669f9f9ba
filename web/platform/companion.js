// The findings as text in the page itself, for screen readers, find-in-page, printing and copying.
//
// The program sends HTML with every text escaped. It is parsed where nothing runs, and only the elements and
// attributes listed here are taken over, so that even a fault in the escaping could not bring in anything else.

const kElements = new Set(('H1 H2 H3 H4 P UL OL LI DL DT DD TABLE CAPTION THEAD TBODY TFOOT TR TH TD SECTION ARTICLE ' +
                           'HEADER FOOTER DIV SPAN BR EM STRONG B I SUB SUP CODE PRE Q BLOCKQUOTE FIGURE FIGCAPTION')
                              .split(' '));
const kAttributes = new Set(['id', 'class', 'scope', 'colspan', 'rowspan', 'lang']);
// Their text is no text for readers.
const kSilent = new Set(['SCRIPT', 'STYLE', 'TEMPLATE', 'NOSCRIPT', 'IFRAME', 'OBJECT', 'TITLE']);

function takeOver(from, to) {
  for (const node of from.childNodes) {
    if (node.nodeType === Node.TEXT_NODE) {
      to.append(node.data);
    } else if (node.nodeType === Node.ELEMENT_NODE && !kSilent.has(node.tagName)) {
      if (!kElements.has(node.tagName)) {
        takeOver(node, to);  // keeps the text of what is dropped
        continue;
      }
      const copy = document.createElement(node.tagName);
      for (const {name, value} of node.attributes) {
        // The page's own elements keep their names to themselves.
        if (kAttributes.has(name)) copy.setAttribute(name, name === 'id' ? `text-${value}` : value);
      }
      takeOver(node, copy);
      to.append(copy);
    }
  }
}

function fillCompanion(html) {
  const fresh = document.createElement('div');
  takeOver(new DOMParser().parseFromString(html, 'text/html').body, fresh);
  // Parts that did not change stay, and with them a reader's place and selection.
  const shown = document.getElementById('findings');
  const parts = [...fresh.childNodes];
  parts.forEach((part, i) => {
    const old = shown.childNodes[i];
    if (!old) shown.append(part);
    else if (!old.isEqualNode(part)) old.replaceWith(part);
  });
  while (shown.childNodes.length > parts.length) shown.lastChild.remove();
}

host.announce = (text) => {
  document.getElementById('announcement').textContent = text;
};

host.companionIsShown = () => companion.classList.contains('shown');
host.showCompanion = (shown) => {
  companion.classList.toggle('shown', shown);
  (shown ? companion : keyboard).focus({preventScroll: true});
};

// Whoever comes here by Tab sees where they are.
companion.addEventListener('focusin', () => companion.classList.add('shown'));

document.getElementById('hide-companion').addEventListener('click', () => {
  host.showCompanion(false);
  requestFrames(2);
});
companion.addEventListener('keydown', (event) => {
  if (event.key !== 'Escape') return;
  host.showCompanion(false);
  requestFrames(2);
});
