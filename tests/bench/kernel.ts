/** The kernel's batch against gl-matrix doing the same, and against the exact circuit. */
import { glMatrix, quat, vec3 } from 'gl-matrix';
import {
  angleOf,
  BATCH_ERROR_RAD,
  between,
  compileModel,
  createIndex,
  legAt,
  type Model,
  poseAt,
  posesAt,
  type Quaternion,
  reconstructPoints,
  rotatePoints,
  toDegrees,
  toMatrix,
} from '../../src/kernel';

export interface BenchRow {
  readonly name: string;
  readonly ours: number | string;
  readonly reference: number | string;
  /** Ours over the reference: below 1 is faster. */
  readonly ratio: number | null;
  readonly unit: string;
}

const POINTS = 1_000_000;
const BLOCKS = 300;
const AGE = 83.7;

/** Numerical Recipes' linear congruential generator: the same model in every run. */
function randoms(seed: number): () => number {
  let state = seed >>> 0;
  return () => (state = (Math.imul(state, 1664525) + 1013904223) >>> 0) / 4294967296;
}

/** Blocks on circuits of one to five links, a row every 10 Myr to 200 Ma. */
function makeModel(): Model {
  const random = randoms(11);
  const codes = Array.from({ length: BLOCKS }, (_, i) => `b${i}`);
  const rotations = codes.flatMap((block, i) => {
    const relative_to = i % 5 === 0 ? 'spin-axis' : `b${i - 1}`;
    const [lat, lon] = [180 * random() - 90, 360 * random() - 180];
    return Array.from({ length: 20 }, (_, k) => ({
      id: `${block}-${k}`,
      block,
      relative_to,
      age_ma: 10 * (k + 1),
      pole_lat: Math.max(-90, Math.min(90, lat + 20 * random() - 10)),
      pole_lon: lon + 20 * random() - 10,
      angle_deg: 3 * (k + 1) + random(),
      evidence: 'published' as const,
      covariance: null,
      cov_dof: null,
      age_two_sigma_ma: null,
      source: null,
    }));
  });
  const life = { appears_ma: null, disappears_ma: null };
  const frame = { code: 'spin-axis', kind: 'frame' as const, ...life };
  return compileModel(
    [frame, ...codes.map((code) => ({ code, kind: 'terrane' as const, ...life }))],
    rotations,
  );
}

/** Least time of several runs, ms: the least disturbed one. */
function least(runs: number, work: () => void): number {
  let best = Infinity;
  for (let i = 0; i < runs; i++) {
    const start = performance.now();
    work();
    best = Math.min(best, performance.now() - start);
  }
  return best;
}

const round = (x: number, digits = 3): number => Number(x.toPrecision(digits));
const timed = (name: string, unit: string, ours: number, reference: number): BenchRow => ({
  name,
  ours: round(ours),
  reference: round(reference),
  ratio: round(ours / reference),
  unit,
});

/** The same poses with gl-matrix: slerp in each link, then a product up the circuit. */
function referencePoses(model: Model, age: number): quat[] {
  const index = createIndex(model);
  const poses: quat[] = [];
  model.blocks.forEach((block, i) => {
    const pose = quat.create();
    const leg = legAt(block, age);
    if (leg) {
      const older = leg.rows.findIndex((row) => row.age_ma >= age);
      const [a, b] = [leg.rows[older - 1]!, leg.rows[older]!];
      const [p, q] = [a.quaternion, b.quaternion];
      quat.slerp(
        pose,
        [p[1], p[2], p[3], p[0]],
        [q[1], q[2], q[3], q[0]],
        (age - a.age_ma) / (b.age_ma - a.age_ma),
      );
      quat.multiply(pose, poses[index.get(leg.relative_to)!]!, pose);
    }
    poses[i] = pose;
  });
  return poses;
}

function worstError(model: Model): number {
  const quaternions = new Float64Array(4 * model.blocks.length);
  const statuses = new Uint8Array(model.blocks.length);
  let worst = 0;
  for (let age = 0; age <= 200; age += 7.3) {
    for (const still of ['spin-axis', 'b4', 'b137']) {
      posesAt(model, age, still, quaternions, statuses);
      model.blocks.forEach(({ code }, i) => {
        const pose = poseAt(model, code, age, still);
        if (pose.status !== 'placed') return;
        const [w, x, y, z] = quaternions.subarray(4 * i, 4 * i + 4) as unknown as Quaternion;
        worst = Math.max(worst, angleOf(between(pose.quaternion, [w, x, y, z])));
      });
    }
  }
  return worst;
}

export default async function bench(): Promise<BenchRow[]> {
  glMatrix.setMatrixArrayType(Float64Array as unknown as Float32ArrayConstructor);
  const random = randoms(5);
  const model = makeModel();
  const given = Float64Array.from({ length: 3 * POINTS }, () => 2 * random() - 1);
  const [ours, theirs] = [new Float64Array(given.length), Float64Array.from(given)];
  const blockOf = Int32Array.from({ length: POINTS }, (_, i) => 1 + Math.floor((i * BLOCKS) / POINTS));

  const turn: Quaternion = [0.8, 0.36, -0.48, 0];
  const matrix = Float64Array.from(toMatrix(turn));
  const q: quat = [turn[1], turn[2], turn[3], turn[0]];
  const rotated = least(7, () => rotatePoints(matrix, 0, given, ours));
  const rotatedReference = least(7, () => {
    vec3.forEach(theirs, 3, 0, 0, vec3.transformQuat, q);
  });

  const quaternions = new Float64Array(4 * model.blocks.length);
  const blockStatuses = new Uint8Array(model.blocks.length);
  const posed = least(50, () => posesAt(model, AGE, 'spin-axis', quaternions, blockStatuses));
  const posedReference = least(50, () => void referencePoses(model, AGE));

  const statuses = new Uint8Array(POINTS);
  const reconstructed = least(7, () =>
    reconstructPoints(model, AGE, 'spin-axis', blockOf, given, ours, statuses),
  );
  const reconstructedReference = least(7, () => {
    const poses = referencePoses(model, AGE);
    const point = vec3.create();
    for (let i = 0, k = 0; i < POINTS; i++, k += 3) {
      vec3.set(point, given[k]!, given[k + 1]!, given[k + 2]!);
      vec3.transformQuat(point, point, poses[blockOf[i]!]!);
      theirs.set(point, k);
    }
  });

  const error = toDegrees(worstError(model));
  const rows: BenchRow[] = [
    timed('rotate 10⁶ points by one rotation, per point (gl-matrix)', 'ns', rotated, rotatedReference),
    timed(
      'reconstruct 10⁶ points of 300 blocks, per point (gl-matrix)',
      'ns',
      reconstructed,
      reconstructedReference,
    ),
    timed(
      'pose 300 blocks at one age, per block (gl-matrix slerp)',
      'µs',
      (posed * 1000) / BLOCKS,
      (posedReference * 1000) / BLOCKS,
    ),
    {
      name: 'worst error of the batch against the exact circuit (bound)',
      ours: error.toExponential(1),
      reference: toDegrees(BATCH_ERROR_RAD).toExponential(1),
      ratio: null,
      unit: '°',
    },
  ];
  return Promise.resolve(rows);
}
