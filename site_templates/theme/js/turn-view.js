// Views of a molecule: three unit rows that point right, up and towards the viewer.

export function turned(view, right, up) {
  // Angles in radians about the paper's own axes: to the right, and the near side upwards.
  const [cr, sr, cu, su] = [Math.cos(right), Math.sin(right), Math.cos(up), Math.sin(up)];
  const [a, b, c] = view;
  const first = combine(cr, a, sr, c);
  const depth = combine(cr, c, -sr, a);
  return settled([first, combine(cu, b, su, depth), combine(cu, depth, -su, b)]);
}

export function projected(point, view, eye) {
  // [right, up, depth towards the viewer, how much larger it is drawn], lengths as given.
  const [x, y, z] = view.map((row) => dot(row, point));
  const growth = eye / (eye - z);
  return [x * growth, y * growth, z, growth];
}

function settled([a, b, c]) {
  // Rounding would shear the view after many small turns.
  const toward = unit(c);
  const upright = unit(combine(1, b, -dot(b, toward), toward));
  return [cross(upright, toward), upright, toward];
}

function combine(s, a, t, b) {
  return a.map((number, k) => s * number + t * b[k]);
}

function dot(a, b) {
  return a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
}

function cross([a, b, c], [x, y, z]) {
  return [b * z - c * y, c * x - a * z, a * y - b * x];
}

function unit(a) {
  const length = Math.sqrt(dot(a, a));
  return a.map((number) => number / length);
}
