// Compounds picked for a comparison: kept while the window is open, two to six of them.

const KEY = "shapeshelf-picks";
export const MOST = 6;

export function pickedIds() {
  try {
    return new Set(JSON.parse(sessionStorage.getItem(KEY) ?? "[]"));
  } catch {
    return new Set();
  }
}

export function keepPicks(picks) {
  try {
    sessionStorage.setItem(KEY, JSON.stringify([...picks]));
  } catch {
    // A browser that keeps nothing still compares what is picked on this page.
  }
}

/** The address of a comparison. */
export function compareAddress(ids) {
  return `compare/?ids=${[...ids].map(encodeURIComponent).join(",")}`;
}
