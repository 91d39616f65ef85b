export * from './convergence';
