/** Readers and writers of what comes in and goes out as files. */
export * from './area-sentence';
export * from './plan-projection';
export * from './read-boundary';
export * from './read-kind';
export * from './read-skyline';
export * from './read-text';
export * from './weather';
