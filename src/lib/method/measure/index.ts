/** Every measured check, in the order in which the page shows its effects. */
import type { Check } from '../check';
import { machineChecks } from './machine';
import { groundChecks } from './ground';
import { energyChecks } from './energy';
import { bodyChecks } from './bodies';
import { clearSkyChecks } from './clear-sky';
import { coordinateChecks } from './coordinates';
import { decompositionChecks } from './decomposition';
import { fuzzChecks } from './fuzz';
import { mountChecks } from './mounts';
import { outsideAirChecks } from './outside-air';
import { practiceChecks } from './practice';
import { rayChecks } from './rays';
import { shadeChecks } from './shade';
import { spacingChecks } from './spacing';
import { sunChecks } from './sun';
import { sunLibraryChecks } from './sun-library';
import { tiltedChecks } from './tilted';
import { unionChecks } from './unions';
import { weatherChecks } from './weather';
import { yearLossChecks } from './year-loss';

export const checks: readonly Check[] = [
	...practiceChecks,
	...sunChecks,
	...sunLibraryChecks,
	...machineChecks,
	...shadeChecks,
	...unionChecks,
	...rayChecks,
	...fuzzChecks,
	...bodyChecks,
	...spacingChecks,
	...mountChecks,
	...yearLossChecks,
	...outsideAirChecks,
	...clearSkyChecks,
	...decompositionChecks,
	...tiltedChecks,
	...weatherChecks,
	...energyChecks,
	...groundChecks,
	...coordinateChecks
];
