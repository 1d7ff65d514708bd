export * from './clock';
export * from './numbers';
export * from './parse-coordinates';
export * from './parse-quantity';
