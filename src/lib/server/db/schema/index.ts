export * from './layouts';
export * from './people';
export * from './plans';
export * from './projects';
export * from './runs';
export * from './teams';
