// Parts of a thing that are made when they are first wanted, or in quiet moments before that.

const LATER = Symbol("parts to make");

/** Give `thing` its parts, `{ name: make(thing) }`, each made once; returns it. */
export function lazily(thing, makers) {
  for (const [name, make] of Object.entries(makers)) {
    Object.defineProperty(thing, name, {
      configurable: true,
      get() {
        const value = make(thing);
        Object.defineProperty(thing, name, { value });
        return value;
      },
    });
  }
  return Object.assign(thing, { [LATER]: Object.keys(makers) });
}

/** Make every part in a quiet moment of its own, one after the other: input comes between. */
export function prepareLater(thing) {
  const idle = globalThis.requestIdleCallback ?? setTimeout;
  const next = () => {
    const name = thing[LATER].shift();
    if (name === undefined) return;
    void thing[name];
    idle(next);
  };
  idle(next);
}
