import {
	moveTracker,
	prepareField,
	type Field,
	type Layout,
	type Place,
	type Plot,
	type Tracker
} from '$lib/core';

/** Above this many moved trackers, preparing the whole field anew is as quick. */
const mostMoves = 4;

/**
 * Keeps the prepared field of the last document state, and updates it cheaply when only a few trackers have moved since:
 * that is every frame of a drag.
 */
export class FieldCache {
	#place: Place | null = null;
	#plot: Plot | null = null;
	#layout: Layout | null = null;
	#field: Field | null = null;

	get(place: Place, plot: Plot, layout: Layout): Field {
		const moved =
			this.#field && this.#layout && this.#place === place && this.#plot === plot
				? movedTrackers(this.#layout, layout)
				: null;
		if (this.#field && moved && moved.length <= mostMoves) {
			for (const index of moved) {
				const { eastM, northM } = layout.trackers[index];
				this.#field = moveTracker(this.#field, index, eastM, northM);
			}
		} else {
			this.#field = prepareField({ place, plot, layout });
		}
		this.#place = place;
		this.#plot = plot;
		this.#layout = layout;
		return this.#field;
	}
}

/** Indexes of trackers that differ in place alone; null when anything else differs. */
export function movedTrackers(before: Layout, after: Layout): number[] | null {
	if (before === after) return [];
	if (before.models !== after.models || before.trackers.length !== after.trackers.length) return null;
	const moved: number[] = [];
	for (let i = 0; i < after.trackers.length; i += 1) {
		const a = before.trackers[i];
		const b = after.trackers[i];
		if (a === b) continue;
		if (!alikeButPlace(a, b)) return null;
		if (a.eastM !== b.eastM || a.northM !== b.northM) moved.push(i);
	}
	return moved;
}

function alikeButPlace(a: Tracker, b: Tracker): boolean {
	return (
		a.id === b.id &&
		a.modelId === b.modelId &&
		a.axisHeightM === b.axisHeightM &&
		a.posture.kind === b.posture.kind &&
		(a.posture.kind !== 'standing' ||
			(b.posture.kind === 'standing' &&
				a.posture.azimuthDeg === b.posture.azimuthDeg &&
				a.posture.tiltDeg === b.posture.tiltDeg))
	);
}
