/** Shapes of what crosses a border: documents, requests, answers, and what documents start with. */
export * from './quantity';
export * from './place';
export * from './ring';
export * from './plot';
export * from './tracker-model';
export * from './model-library';
export * from './mount';
export * from './layout';
export * from './winter-rule';
export * from './document-version';
export * from './run';
export * from './project';
export * from './plan';
export * from './compute';
export * from './account';
export * from './problem';
export * from './page';
