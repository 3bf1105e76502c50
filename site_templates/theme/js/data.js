// How data come to a page: fetched, or where pages are opened as files, handed over by a script.

const held = new Map();
const awaited = new Map();

globalThis.shapeshelfData = {
  deliver(name, text) {
    awaited.get(name)?.(JSON.parse(text));
  },
};

/** The data of that name, the same promise however often it is asked for. */
export function loadData(root, name) {
  if (!held.has(name)) {
    const coming = asFiles() ? byScript(root, name) : byFetch(root, name);
    held.set(name, coming);
    coming.catch(() => held.delete(name));
  }
  return held.get(name);
}

/** Where a page of the site stands, seen from this one. */
export function pageAddress(root, address) {
  const [, path, rest] = /^([^?#]*)(.*)$/.exec(address);
  const page = asFiles() && /(^|\/)$/.test(path) ? `${path}index.html` : path;
  return new URL(root + page + rest, document.baseURI).href;
}

function asFiles() {
  return document.documentElement.dataset.files !== undefined;
}

async function byFetch(root, name) {
  const answer = await fetch(new URL(`${root}${name}.json`, document.baseURI));
  if (!answer.ok) throw new Error(`${name}: ${answer.status}`);
  return answer.json();
}

function byScript(root, name) {
  return new Promise((resolve, reject) => {
    const script = document.createElement("script");
    awaited.set(name, resolve);
    script.onerror = () => reject(new Error(`${name}: not found`));
    script.onload = () => reject(new Error(`${name}: nothing handed over`));
    script.src = new URL(`${root}${name}.js`, document.baseURI).href;
    document.head.append(script);
  });
}
