// Makes tests/cases/rotations-high-precision.json: compositions, interpolations and rotated points worked out with 60 digits.
//
//   node scripts/make-cases/rotations.mjs
//
// The arithmetic shares nothing with the kernel: compositions are products of 3 × 3 matrices by Rodrigues' formula, interpolations take
// axis and angle of the matrix R₂R₁ᵀ, and quaternions are read off the result at the end. Inputs are drawn from a seeded generator,
// rounded to what a table of poles would hold, and stored as they are used, so the cases can be made again anywhere.
import { writeFileSync } from 'node:fs';
import { Decimal } from 'decimal.js';

Decimal.set({ precision: 60 });
const PI = Decimal.acos(-1);
const D = (x) => new Decimal(x);
const radians = (degrees) => D(degrees).times(PI).div(180);
const degrees = (angle) => angle.times(180).div(PI);

let state = 20110811;
function random() {
  state = (state + 0x6d2b79f5) | 0;
  let t = Math.imul(state ^ (state >>> 15), 1 | state);
  t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
  return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
}
const between = (low, high, digits) => Number((low + (high - low) * random()).toFixed(digits));

const POLE_LATITUDES = [
  () => between(-90, 90, 4),
  () => 90,
  () => -90,
  () => Number((90 - 10 ** between(-9, -2, 2)).toPrecision(15)),
  () => 0,
];
const ANGLES = [
  () => between(-180, 180, 4),
  () => Number((10 ** between(-9, -3, 2)).toPrecision(6)),
  () => Number((180 - 10 ** between(-9, -3, 2)).toPrecision(15)),
  () => 180,
  () => between(-30, 30, 3),
];
const pick = (choices) => choices[Math.floor(random() * choices.length)]();
const pole = () => ({
  pole_lat: pick(POLE_LATITUDES),
  pole_lon: between(-180, 180, 4),
  angle_deg: pick(ANGLES),
});

const vector = (lat, lon) => {
  const [p, l] = [radians(lat), radians(lon)];
  return [p.cos().times(l.cos()), p.cos().times(l.sin()), p.sin()];
};

/** Rodrigues: R = cos ω I + sin ω [n]× + (1 − cos ω) n nᵀ. */
function aboutAxis([x, y, z], angle) {
  const [c, s] = [angle.cos(), angle.sin()];
  const v = D(1).minus(c);
  return [
    [
      c.plus(x.times(x).times(v)),
      x.times(y).times(v).minus(z.times(s)),
      x.times(z).times(v).plus(y.times(s)),
    ],
    [
      x.times(y).times(v).plus(z.times(s)),
      c.plus(y.times(y).times(v)),
      y.times(z).times(v).minus(x.times(s)),
    ],
    [
      x.times(z).times(v).minus(y.times(s)),
      y.times(z).times(v).plus(x.times(s)),
      c.plus(z.times(z).times(v)),
    ],
  ];
}
const matrix = ({ pole_lat, pole_lon, angle_deg }) =>
  aboutAxis(vector(pole_lat, pole_lon), radians(angle_deg));
const dot = (a, b) => a.reduce((sum, x, i) => sum.plus(x.times(b[i])), D(0));
const column = (m, j) => m.map((row) => row[j]);
const product = (a, b) => a.map((row) => [0, 1, 2].map((j) => dot(row, column(b, j))));
const transpose = (m) => [0, 1, 2].map((j) => column(m, j));
const apply = (m, v) => m.map((row) => dot(row, v));

/** The unit quaternion with w ≥ 0, by the greatest of its components. */
function quaternion(m) {
  const t = [
    D(1).plus(m[0][0]).plus(m[1][1]).plus(m[2][2]),
    D(1).plus(m[0][0]).minus(m[1][1]).minus(m[2][2]),
    D(1).minus(m[0][0]).plus(m[1][1]).minus(m[2][2]),
    D(1).minus(m[0][0]).minus(m[1][1]).plus(m[2][2]),
  ];
  const rows = [
    [t[0], m[2][1].minus(m[1][2]), m[0][2].minus(m[2][0]), m[1][0].minus(m[0][1])],
    [m[2][1].minus(m[1][2]), t[1], m[0][1].plus(m[1][0]), m[0][2].plus(m[2][0])],
    [m[0][2].minus(m[2][0]), m[0][1].plus(m[1][0]), t[2], m[1][2].plus(m[2][1])],
    [m[1][0].minus(m[0][1]), m[0][2].plus(m[2][0]), m[1][2].plus(m[2][1]), t[3]],
  ];
  const q = rows[t.findIndex((x) => x.eq(Decimal.max(...t)))];
  const length = dot(q, q)
    .sqrt()
    .times(q[0].isNegative() ? -1 : 1);
  return q.map((x) => x.div(length));
}

/** Axis and angle in [0, π] of a rotation, from its quaternion. */
function axisAngle(m) {
  const [w, ...v] = quaternion(m);
  const length = dot(v, v).sqrt();
  return { axis: v.map((x) => x.div(length)), angle: Decimal.atan2(length, w).times(2) };
}

const numbers = (values) => values.map((x) => Number(x.toPrecision(20)));

const compositions = Array.from({ length: 80 }, () => {
  const [first, second] = [pole(), pole()];
  return { first, second, quaternion: numbers(quaternion(product(matrix(second), matrix(first)))) };
});

const interpolations = [];
while (interpolations.length < 80) {
  const [younger, older] = [pole(), pole()];
  const fraction = [0.5, 0, 1, between(0, 1, 4), between(0, 1, 4), between(1, 1.5, 2)][
    interpolations.length % 6
  ];
  const stage = axisAngle(product(matrix(older), transpose(matrix(younger))));
  const stage_deg = degrees(stage.angle);
  if (stage_deg.gt(179) || stage_deg.lt('1e-8')) continue;
  const at = product(aboutAxis(stage.axis, stage.angle.times(fraction)), matrix(younger));
  interpolations.push({
    younger,
    older,
    fraction,
    stage_deg: Number(stage_deg.toPrecision(12)),
    quaternion: numbers(quaternion(at)),
  });
}

const points = Array.from({ length: 60 }, () => {
  const rotation = pole();
  const [lat, lon] = [pick(POLE_LATITUDES), between(-180, 180, 4)];
  return { rotation, lat, lon, vector: numbers(apply(matrix(rotation), vector(lat, lon))) };
});

const file = new URL('../../tests/cases/rotations-high-precision.json', import.meta.url);
const source = 'scripts/make-cases/rotations.mjs: matrices by Rodrigues’ formula with 60 digits (decimal.js)';
const conventions =
  'Poles in degrees, right-hand rule; composition: first, then second; interpolation from younger (0) to older (1) the shorter way; quaternions [w, x, y, z] with w ≥ 0.';
const lines = (name, cases) =>
  `  ${JSON.stringify(name)}: [\n${cases.map((c) => `    ${JSON.stringify(c)}`).join(',\n')}\n  ]`;
const body = [
  `  "source": ${JSON.stringify(source)}`,
  `  "conventions": ${JSON.stringify(conventions)}`,
  lines('compositions', compositions),
  lines('interpolations', interpolations),
  lines('points', points),
];
writeFileSync(file, `{\n${body.join(',\n')}\n}\n`);
