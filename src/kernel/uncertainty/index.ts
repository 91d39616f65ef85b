export * from './pose-uncertainty';
export * from './ellipse';
export * from './shares';
export * from './forms';
export * from './confidence';
export * from './f-distribution';
export * from './sensitivity';
export * from './jacobians';
