export { startJobs, stopJobs, stopWorkingRun, wakeJobs } from './dispatcher';
export { listenToRun } from './run-events';
