/** Readers of hourly weather files. */
export * from './read-weather';
export { readEpw } from './read-epw';
export { readTmy3 } from './read-tmy3';
export type { WeatherReading } from './hours';
