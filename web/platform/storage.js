// Keeps the review on this machine while it is typed.
//
// Every open page has a slot of its own, so that two windows with two papers never overwrite each other. A lock that
// the browser drops when the page goes, even in a crash, tells which slots are in use. Texts go into IndexedDB; where
// that is shut off, into localStorage. Pages opened from disk may share this storage with any other page opened from
// disk, hence the prefixes.

const kPrefix = 'rejoinder/';
const kKeepDelay = 250;  // milliseconds of rest before a write

let shelf = null;  // where reviews are kept: all(), put(), remove(), setAside()
let slot = '';     // of this page
let keepTimer = 0;
let newest = null;  // {text, time}: what must be written
let writing = false;

// ---- two shelves of the same form; an entry is {text, time}, time in milliseconds

function promised(request) {
  return new Promise((resolve, reject) => {
    request.onsuccess = () => resolve(request.result);
    request.onerror = () => reject(request.error);
  });
}

async function openDatabaseShelf() {
  const request = indexedDB.open('rejoinder', 1);
  request.onupgradeneeded = () => {
    request.result.createObjectStore('reviews');
    request.result.createObjectStore('aside');
  };
  const database = await promised(request);
  // The write has reached the disk when this resolves, as far as the browser can tell.
  const write = (store, act) => new Promise((resolve, reject) => {
    const transaction = database.transaction(store, 'readwrite', {durability: 'strict'});
    act(transaction.objectStore(store));
    transaction.oncomplete = resolve;
    transaction.onabort = transaction.onerror = () => reject(transaction.error);
  });
  return {
    async all() {
      const store = database.transaction('reviews').objectStore('reviews');
      const [names, entries] = await Promise.all([promised(store.getAllKeys()), promised(store.getAll())]);
      return new Map(names.map((name, i) => [name, entries[i]]));
    },
    put: (name, entry) => write('reviews', (store) => store.put(entry, name)),
    remove: (name) => write('reviews', (store) => store.delete(name)),
    setAside: (name, entry) => write('aside', (store) => store.put(entry, name)),
  };
}

function plainShelf() {
  const reviews = `${kPrefix}review/`;
  return {
    async all() {
      const entries = new Map();
      for (let i = 0; i < localStorage.length; ++i) {
        const key = localStorage.key(i);
        if (key.startsWith(reviews)) entries.set(key.slice(reviews.length), entryIn(localStorage.getItem(key)));
      }
      return entries;
    },
    async put(name, entry) {
      localStorage.setItem(reviews + name, JSON.stringify(entry));
    },
    async remove(name) {
      localStorage.removeItem(reviews + name);
    },
    async setAside(name, entry) {
      localStorage.setItem(`${kPrefix}aside/${name}`, JSON.stringify(entry));
    },
  };
}

// A stored text that is no entry of ours is kept as the text of one, so that the app may see it and refuse it.
function entryIn(stored) {
  try {
    return JSON.parse(stored);
  } catch {
    return {text: stored, time: 0};
  }
}

async function openShelf() {
  const tooLong = new Promise((resolve, reject) => setTimeout(reject, 3000));
  try {
    shelf = await Promise.race([openDatabaseShelf(), tooLong]);
  } catch {
    shelf = plainShelf();
  }
}

// ---- what a page that went in haste left behind: its last words go into localStorage, the only quick way

function leavingKey(name) {
  return `${kPrefix}leaving/${name}`;
}

async function collectLastWords(entries) {
  try {
    const prefix = leavingKey('');
    for (const key of Object.keys(localStorage).filter((name) => name.startsWith(prefix))) {
      const name = key.slice(prefix.length);
      const entry = entryIn(localStorage.getItem(key));
      const older = entries.get(name);
      if (typeof entry.text === 'string' && (!older || !(older.time >= entry.time))) {
        entries.set(name, entry);
        await shelf.put(name, entry);
      }
      localStorage.removeItem(key);
    }
  } catch {
    // No localStorage, no last words.
  }
}

// ---- slots

function holdSlot(name) {
  if (!navigator.locks) return Promise.resolve(true);
  return new Promise((resolve) => {
    navigator.locks.request(kPrefix + name, {ifAvailable: true}, (lock) => {
      resolve(lock !== null);
      return lock && new Promise(() => {});  // held until the page goes
    }).catch(() => resolve(true));
  });
}

function session(value) {
  try {
    if (value !== undefined) sessionStorage.setItem(`${kPrefix}slot`, value);
    return sessionStorage.getItem(`${kPrefix}slot`);
  } catch {
    return null;
  }
}

// A reload keeps its slot; a new page takes the latest review that no other page holds, else an empty slot.
async function claimSlot(names, wantsEmpty) {
  const mine = session();
  const fresh = `${Date.now().toString(36)}${Math.random().toString(36).slice(2, 6)}`;
  if (!wantsEmpty && mine !== '') {
    for (const name of mine === null ? names : [mine, ...names]) {
      if (await holdSlot(name)) return name;
    }
  }
  await holdSlot(fresh);
  return fresh;
}

// Opens the storage and finds this page's place in it: {kept, others}.
async function openStorage(wantsEmpty) {
  await openShelf();
  let entries = new Map();
  try {
    entries = await shelf.all();
    await collectLastWords(entries);
  } catch {
    shelf = null;
  }
  const age = (name) => Number(entries.get(name)?.time) || 0;
  const names = [...entries.keys()].map(String).sort((a, b) => age(b) - age(a));
  slot = await claimSlot(names, wantsEmpty);
  session(slot);
  // Whatever is stored reaches the app as text; what is none of ours it refuses, and it is set aside.
  const textOf = (entry) => entry === undefined ? '' : typeof entry?.text === 'string' ? entry.text : JSON.stringify(entry) || '?';
  const others = names.filter((name) => name !== slot).map((name) => {
    return {slot: name, keptAt: localTime(new Date(age(name))), text: textOf(entries.get(name))};
  });
  return {kept: textOf(entries.get(slot)), others};
}

async function setAside(text) {
  if (shelf) await shelf.setAside(`${slot} ${new Date().toISOString()}`, {text, time: Date.now()});
}

// ---- writing

function tellKept(time) {
  withTexts([time], (address) => program._on_kept(address));
  requestFrames(2);
}

async function writeNewest() {
  if (writing || !newest) return;
  writing = true;
  const entry = newest;
  try {
    if (!shelf) throw new Error('no storage');
    await shelf.put(slot, entry);
    ++figures.writes;
    tellKept(clockOf(new Date(entry.time)));
  } catch {
    tellKept('');
  }
  writing = false;
  if (newest === entry) newest = null;
  else writeNewest();
}

function keepNow() {
  clearTimeout(keepTimer);
  keepTimer = 0;
  newest = {text: textAt(program._text_to_keep()), time: Date.now()};
  writeNewest();
}

host.keepSoon = () => {
  clearTimeout(keepTimer);
  keepTimer = setTimeout(keepNow, kKeepDelay);
};

// The page may be gone before a write ends, so the text also takes the quick way.
function leave() {
  if (!ready || (!keepTimer && !newest)) return;
  keepNow();
  try {
    localStorage.setItem(leavingKey(slot), JSON.stringify(newest));
  } catch {
    // Full or shut off; the write under way is all there is.
  }
}
addEventListener('pagehide', leave);
document.addEventListener('visibilitychange', () => {
  if (document.hidden) leave();
});

// ---- other reviews, and small choices

host.openKept = (name) => {
  leave();
  session(name);  // "" asks for an empty slot
  location.reload();
};

host.forgetKept = (name) => {
  if (shelf && name !== slot) shelf.remove(name).catch(() => {});
};

host.remember = (name, value) => {
  try {
    localStorage.setItem(`${kPrefix}choice/${name}`, value);
  } catch {
    // The choice then lasts as long as the page.
  }
};

host.remembered = (name) => {
  try {
    return localStorage.getItem(`${kPrefix}choice/${name}`) || '';
  } catch {
    return '';
  }
};
