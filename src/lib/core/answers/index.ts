export type * from './results';
export * from './answers-year';
export { highestSunDeg } from './clear-height';
