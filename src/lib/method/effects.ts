import type { Effect } from './effect';
import { lightEffects } from './effects-light';
import { placeEffects } from './effects-place';
import { shadeEffects } from './effects-shade';
import { sunEffects } from './effects-sun';

/** Effects under the headings of the page, in its order. */
export const effectGroups = [
	{ id: 'sun', title: 'The sun', effects: sunEffects },
	{ id: 'shade', title: 'Shade', effects: shadeEffects },
	{ id: 'light', title: 'Light and energy', effects: lightEffects },
	{ id: 'place', title: 'Place and ground', effects: placeEffects }
] as const;

export type EffectId = (typeof effectGroups)[number]['effects'][number]['id'];

export const effects: readonly Effect<EffectId>[] = effectGroups.flatMap(
	(group): readonly Effect<EffectId>[] => group.effects
);
