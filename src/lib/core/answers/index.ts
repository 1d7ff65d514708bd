export type * from './results';
export * from './answers-year';
