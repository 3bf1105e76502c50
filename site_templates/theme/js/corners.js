// The angles of all compounds, unpacked once: for compound `item` those from `from[item]` on.

import { unpacked } from "./packed.js";

/** `{ from, kind, tenths }`: where each compound's angles begin, between what, tenths of a degree. */
export function cornersOf({ compounds }) {
  const from = new Uint32Array(compounds.corners.length + 1);
  const kind = [];
  const tenths = [];
  compounds.corners.forEach((text, item) => {
    const steps = unpacked(compounds.angles[item]);
    const counted = unpacked(text);
    let step = 0;
    for (let at = 0; at < counted.length; at += 2) {
      let angle = 0;
      for (let n = 0; n < counted[at + 1]; n += 1) {
        angle += steps[step];
        step += 1;
        kind.push(counted[at]);
        tenths.push(angle);
      }
    }
    from[item + 1] = kind.length;
  });
  return { from, kind: Uint16Array.from(kind), tenths: Uint16Array.from(tenths) };
}
