export * from './convergence';
export * from './outline';
export * from './separation';
export * from './overlap';
export * from './pair';
export * from './separation-path';
export { ROOT_TOLERANCE_MYR, SHORTEST_EXCURSION_MYR } from './roots';
export * from './first-contact';
export * from './flow-line';
