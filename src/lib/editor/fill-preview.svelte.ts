import {
	fillPlot,
	groundCover,
	leastPitchM,
	reachRadiusM,
	type Layout,
	type PlanPoint,
	type TrackerModel
} from '$lib/core';
import { formatNumber } from '$lib/i18n';
import type { Editor } from './editor.svelte';
import { leastAcrossM, leastAlongM } from './kernels/fill-pitch';
import { addTrackers, removeTrackers } from './kernels/layout-edit';
import { PreviewClient } from './preview-client';

const quietMs = 150;

/** Pitches that keep circles apart and the winter loss moderate: common practice, no source. */
export function usualPitch(model: TrackerModel): { eastWestM: number; northSouthM: number } {
	const least = leastPitchM(model);
	const half = (valueM: number): number => Math.ceil(valueM * 2) / 2;
	return {
		eastWestM: half(Math.max(least, model.widthM * 2.1)),
		northSouthM: half(Math.max(least, model.heightM * 2.6))
	};
}

/** A fill that is being considered: where trackers would stand and what it would mean, before anything is changed. */
export class FillPreview {
	readonly editor: Editor;
	eastWestM = $state(13);
	northSouthM = $state(10.5);
	/** Shift of every other row, percent of the pitch along the row. */
	staggerPercent = $state(50);
	turnDeg = $state(0);
	replace = $state(true);
	/** Shaded part of the beam on the shortest day; null while it is being computed. */
	dayLoss = $state<number | null>(null);
	clearAboveDeg = $state<number | null>(null);
	failure = $state<string | null>(null);
	/** Why what is typed in a field was refused, by field; while one is, nothing is foretold or placed. */
	refusals = $state<Record<'along' | 'across' | 'stagger' | 'turn' | 'axis', string | null>>({
		along: null,
		across: null,
		stagger: null,
		turn: null,
		axis: null
	});

	constructor(editor: Editor) {
		this.editor = editor;
		if (editor.model) this.useUsual(editor.model);
		this.replace = editor.store.layout.trackers.length === 0;
	}

	/** What two feet must keep between them for their circles not to overlap. */
	readonly apartM = $derived.by(() => (this.editor.model ? 2 * reachRadiusM(this.editor.model) : 0));
	readonly leastAlongM = $derived(leastAlongM(this.apartM));
	readonly leastAcrossM = $derived(leastAcrossM(this.apartM, this.eastWestM, this.staggerPercent / 100));
	/** Pitches that would let circles overlap, as sentences with the least that does not. */
	readonly alongProblem = $derived(
		this.eastWestM < this.leastAlongM
			? `Reach circles would overlap: give ${formatNumber(this.leastAlongM, 2)} m or more.`
			: null
	);
	readonly acrossProblem = $derived(
		this.alongProblem === null && this.northSouthM < this.leastAcrossM
			? `Reach circles would overlap: give ${formatNumber(this.leastAcrossM, 2)} m or more${this.staggerPercent > 0 ? ', or change the stagger' : ''}.`
			: null
	);
	/** Whether every field holds something that can be filled by. */
	readonly sound = $derived(
		this.alongProblem === null &&
			this.acrossProblem === null &&
			Object.values(this.refusals).every((refusal) => refusal === null)
	);

	readonly points = $derived.by((): PlanPoint[] => {
		const { store, model } = this.editor;
		if (!model || store.plot.boundary.length === 0 || !this.sound) return [];
		const points = fillPlot({
			plot: store.plot,
			model,
			pitchEastWestM: this.eastWestM,
			pitchNorthSouthM: this.northSouthM,
			stagger: this.staggerPercent / 100,
			turnDeg: this.turnDeg
		});
		return this.replace ? points : this.#clearOfOthers(points, model);
	});

	readonly layout = $derived.by((): Layout | null => {
		const { store, model } = this.editor;
		if (!model || this.points.length === 0) return null;
		const base = this.replace
			? removeTrackers(store.layout, new Set(store.layout.trackers.map(({ id }) => id)))
			: store.layout;
		const added = this.points.map((point, index) => ({
			id: `fill-${index}`,
			tag: `${index}`,
			point,
			axisHeightM: this.editor.newAxisHeightM
		}));
		return addTrackers(base, model, added);
	});

	readonly cover = $derived.by(() => (this.layout ? groundCover(this.editor.store.plot, this.layout) : null));

	useUsual(model: TrackerModel): void {
		const { eastWestM, northSouthM } = usualPitch(model);
		this.eastWestM = eastWestM;
		this.northSouthM = northSouthM;
	}

	/** Keeps the shortest-day figures up to date while the card is open. Call in an effect of a component. */
	connect(): () => void {
		const client = new PreviewClient(
			(answer) => {
				this.dayLoss = answer.shortestDay.beamLoss;
				this.clearAboveDeg = answer.verdict.clearAboveDeg;
				this.failure = null;
			},
			(message) => (this.failure = message)
		);
		const stop = $effect.root(() => {
			$effect(() => {
				const { layout } = this;
				const { store } = this.editor;
				this.dayLoss = null;
				if (!layout) return;
				const request = {
					place: store.project.place,
					plot: store.plot,
					layout,
					winterRule: store.project.winterRule,
					date: store.jumps.shortest,
					shortestDate: store.jumps.shortest,
					stepMinutes: 10,
					utcOffsetMinutes: store.utcOffsetMinutes
				};
				const timer = setTimeout(() => client.ask(request), quietMs);
				return () => clearTimeout(timer);
			});
		});
		return () => {
			stop();
			client.close();
		};
	}

	accept(): void {
		const count = this.points.length;
		if (count === 0) return;
		this.editor.addPoints(`Fill the plot with ${count}`, this.points, {
			replace: this.replace,
			turnDeg: this.turnDeg,
			rowToleranceM: this.northSouthM / 2
		});
		this.editor.select([]);
		this.editor.useTool('select');
	}

	/** Added trackers leave those that stand alone: no circle may touch one of theirs. */
	#clearOfOthers(points: PlanPoint[], model: TrackerModel): PlanPoint[] {
		const own = reachRadiusM(model);
		const standing = this.editor.store.layout.trackers.map(({ eastM, northM, modelId }) => {
			const other = this.editor.store.modelOf(modelId);
			return { eastM, northM, apartM: own + (other ? reachRadiusM(other) : own) };
		});
		return points.filter(([eastM, northM]) =>
			standing.every((other) => Math.hypot(other.eastM - eastM, other.northM - northM) >= other.apartM)
		);
	}
}
