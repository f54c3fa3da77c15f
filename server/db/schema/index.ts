export * from './derived';
export * from './imports';
export * from './machines';
export * from './parts';
export * from './people';
export * from './records';
export * from './repairs';
export * from './shops';
