export { startJobs, stopJobs, stopWorkingRun, wakeJobs } from './dispatcher';
export { listenToRun, tellRun } from './run-events';
