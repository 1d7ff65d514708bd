export * from './layouts';
export * from './members';
export * from './people';
export * from './plans';
export * from './projects';
export * from './runs';
export * from './teams';
