export * from './convergence';
export * from './outline';
export * from './separation';
export * from './overlap';
