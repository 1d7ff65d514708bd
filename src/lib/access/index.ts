export * from './actions';
export * from './roles';
