/**
 * The kernel's own picture of a reconstruction: what goes in, what compiling makes of it, and what an
 * evaluation answers. Everything here is plain JSON, so that a compiled model travels to the browser as it is.
 *
 * Angles are degrees in the rows that people enter and radians in everything that compiling makes.
 * Quaternions are unit, ordered [w, x, y, z]. Vectors are unit, in the frame p(φ, λ) = (cos φ cos λ, cos φ sin λ, sin φ).
 */

export type Vector3 = readonly [x: number, y: number, z: number];
export type Quaternion = readonly [w: number, x: number, y: number, z: number];
/** Row-major 3 × 3. */
export type Matrix3 = readonly [number, number, number, number, number, number, number, number, number];
/** The six entries xx, xy, xz, yy, yz, zz of a symmetric 3 × 3 matrix in rad². */
export type Covariance = readonly [xx: number, xy: number, xz: number, yy: number, yz: number, zz: number];

export const BLOCK_KINDS = ['craton', 'terrane', 'arc', 'ocean', 'frame', 'other'] as const;
export type BlockKind = (typeof BLOCK_KINDS)[number];

/** What blocks carry: boundaries, lines, places, areas. */
export const FEATURE_KINDS = [
  'ridge',
  'trench',
  'transform',
  'suture',
  'margin',
  'isochron',
  'fracture_zone',
  'pick',
  'rock',
  'layer',
] as const;

export const EVIDENCE = ['published', 'fitted', 'posed', 'unconstrained'] as const;
export type Evidence = (typeof EVIDENCE)[number];

/** Why a block has, or has not, a position at an age. `placed` alone comes with a rotation. */
export const STATUSES = [
  'placed',
  'no block here',
  'ambiguous block',
  'older than block',
  'younger than block',
  'outside rotations',
  'not connected',
] as const;
export type Status = (typeof STATUSES)[number];

export interface BlockInput {
  readonly code: string;
  readonly kind: BlockKind;
  /** Oldest age of existence, included; null: no known start. */
  readonly appears_ma: number | null;
  /** Youngest age of existence, excluded; null or 0: still present. */
  readonly disappears_ma: number | null;
}

export interface RotationInput {
  /** Identifies the row to whoever supplied it; unique within a model. */
  readonly id: string;
  readonly block: string;
  readonly relative_to: string;
  readonly age_ma: number;
  readonly pole_lat: number;
  readonly pole_lon: number;
  readonly angle_deg: number;
  readonly evidence: Evidence;
  readonly covariance: Covariance | null;
  /** Degrees of freedom on which κ̂ was estimated; null where it was known. */
  readonly cov_dof: number | null;
  readonly age_two_sigma_ma: number | null;
  readonly source: string | null;
}

/** A row of a leg. `implied` marks the exact identity at 0 Ma of a block still present, which nobody entered. */
export interface CompiledRow extends Omit<RotationInput, 'block' | 'relative_to'> {
  readonly quaternion: Quaternion;
  readonly implied: boolean;
}

/** Constant-rate motion between two neighbouring rows: R(t) = Exp(rate · (t − younger_ma) · axis) · start. */
export interface Stage {
  readonly younger_ma: number;
  readonly older_ma: number;
  readonly start: Quaternion;
  /** Stage pole in the reference's coordinates. */
  readonly axis: Vector3;
  /** Radians per Myr with growing age; never negative (the axis turns instead). */
  readonly rate: number;
}

/** A maximal run of one reference in age order; rows youngest first, one stage fewer than rows. */
export interface Leg {
  readonly relative_to: string;
  readonly younger_ma: number;
  readonly older_ma: number;
  readonly rows: readonly CompiledRow[];
  readonly stages: readonly Stage[];
}

export interface CompiledBlock extends BlockInput {
  /** Youngest first. */
  readonly legs: readonly Leg[];
}

/** What compiling found wrong; the rest of the model still works. */
export type ModelProblem =
  | { readonly name: 'DuplicateBlock'; readonly block: string }
  | { readonly name: 'UnknownBlock'; readonly block: string; readonly rotation: string }
  | {
      readonly name: 'MissingReference';
      readonly block: string;
      readonly relative_to: string;
      readonly older_ma: number;
      readonly younger_ma: number;
    }
  | {
      readonly name: 'DuplicateRow';
      readonly block: string;
      readonly relative_to: string;
      readonly age_ma: number;
      readonly rotations: readonly string[];
    }
  | {
      readonly name: 'Cycle';
      readonly loop: readonly string[];
      readonly older_ma: number;
      readonly younger_ma: number;
    }
  | { readonly name: 'NonIdentityAtPresent'; readonly block: string; readonly rotation: string }
  | {
      readonly name: 'InvalidRow';
      readonly block: string;
      readonly rotation: string;
      readonly quantity: 'age_ma' | 'pole_lat' | 'pole_lon' | 'angle_deg';
      readonly read: string;
    }
  | {
      readonly name: 'LegGap';
      readonly block: string;
      readonly older_ma: number;
      readonly younger_ma: number;
    }
  | {
      readonly name: 'ParallelSequences';
      readonly block: string;
      readonly references: readonly string[];
      readonly older_ma: number;
      readonly younger_ma: number;
    }
  | {
      readonly name: 'NearHalfTurnStage';
      readonly block: string;
      readonly relative_to: string;
      readonly older_ma: number;
      readonly younger_ma: number;
      readonly angle_deg: number;
    };

/** The `motions` answer of the API: every circuit's links, ready to evaluate at any age. */
export interface Model {
  readonly blocks: readonly CompiledBlock[];
  readonly problems: readonly ModelProblem[];
  /** Oldest age at which anything has a rotation; 0 for an empty model. */
  readonly oldest_ma: number;
}

/** One link of a circuit at an age. */
export interface Link {
  readonly block: string;
  readonly relative_to: string;
  /** `up`: R(block | relative_to) as stored; `down`: its inverse, on the way from a common ancestor to the reference. */
  readonly direction: 'up' | 'down';
  /** The factor as it enters the product, so already inverted where `down`. */
  readonly quaternion: Quaternion;
  readonly younger: CompiledRow;
  /** The same row as `younger` exactly at a row's age. */
  readonly older: CompiledRow;
  /** s = (t − t₁)/(t₂ − t₁), 0 at the younger row. */
  readonly fraction: number;
  readonly stage: Stage | null;
  /** True where the last stage is held beyond the oldest row on request. */
  readonly extrapolated: boolean;
}

/**
 * R(block | reference) at an age. `links` run from the block to the reference: the quaternion is the product of theirs, the last leftmost.
 */
export type Pose =
  | { readonly status: 'placed'; readonly quaternion: Quaternion; readonly links: readonly Link[] }
  | {
      readonly status: Exclude<Status, 'placed'>;
      readonly quaternion: null;
      /** The block whose rotations or existence end the circuit. */
      readonly at: string;
      readonly links: readonly Link[];
    };
