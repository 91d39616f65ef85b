/**
 * The reconstruction kernel: pure functions of numbers, in browser and server alike. Conventions: degrees and
 * Ma at the edge, unit vectors and quaternions inside.
 */

/** Typed errors, each with a permanent name. */
export * from './errors';

/** Places, distances, azimuths, arcs, rings and areas on the unit sphere. */
export * from './sphere';

/** Finite rotations, sequences, circuits, stages, velocities and drift paths. */
export * from './rotations';

/** Covariances of rotations, 95 % ellipses of places, shares of each row. */
export * from './uncertainty';

/** What two blocks do to each other: convergence, separation, overlap, contact, flow lines; a block's card. */
export * from './kinematics';

/** The chronostratigraphic chart. */
export * from './timescale';
