/** The computing core. Everything outside this room imports from here. */
export * from './version';
export * from './conventions';
export type * from './document';
export type * from './results';
export * from './sun/position';
export * from './sun/day';
export * from './geometry/ground';
export * from './geometry/skyline';
export * from './machine/aim';
export * from './machine/pose';
export * from './machine/reach';
export * from './layout/polygon';
export * from './layout/rows';
export * from './layout/tags';
export * from './layout/fill-plot';
export * from './layout/check-layout';
export * from './layout/ground-cover';
