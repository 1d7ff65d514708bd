import { getContext, setContext } from 'svelte';
import { nextTags, type PlanPoint, type Tracker, type TrackerModel } from '$lib/core';
import type { AlignGuide } from './kernels/align';
import { addTrackers, changeTrackers, removeTrackers } from './kernels/layout-edit';
import { tagForOne } from './kernels/single-tag';
import type { PlanBox } from './kernels/pick';
import type { ProjectStore } from './project-store.svelte';

export type ToolId = 'select' | 'place' | 'row' | 'fill' | 'measure';
/** `space` is the 3D view, `sun` looks from the sun. */
export type ViewId = 'space' | 'plan' | 'sun';

export interface RowSpacing {
	by: 'pitch' | 'count';
	pitchM: number;
	count: number;
}

/** What a person is doing with the layout right now: tool, view, selection, and what a gesture shows before it is done. */
export class Editor {
	readonly store: ProjectStore;
	tool = $state<ToolId>('select');
	view = $state<ViewId>('plan');
	selected = $state.raw<string[]>([]);
	hoverId = $state<string | null>(null);
	/** Places where trackers would stand if the gesture were finished now. */
	ghosts = $state.raw<PlanPoint[]>([]);
	guides = $state.raw<AlignGuide[]>([]);
	box = $state.raw<PlanBox | null>(null);
	measured = $state.raw<{ from: PlanPoint; to: PlanPoint } | null>(null);
	rowSpacing = $state<RowSpacing>({ by: 'pitch', pitchM: 0, count: 6 });
	/** Said to screen readers. */
	said = $state('');
	/** Trackers that a view should bring to its middle; the number makes each wish a new one. */
	flight = $state.raw<{ ids: string[]; count: number }>({ ids: [], count: 0 });
	#modelId = $state<string | null>(null);
	/** Axis height chosen for new trackers of one model; gone when heights of standing trackers are changed. */
	#axis = $state.raw<{ modelId: string; heightM: number } | null>(null);
	/** Answers whether the tool in hand had anything to give up. */
	#cancelTool: (() => boolean) | null = null;

	readonly selectedSet: ReadonlySet<string> = $derived(new Set(this.selected));
	readonly selectedTrackers = $derived.by((): Tracker[] =>
		this.store.layout.trackers.filter((tracker) => this.selectedSet.has(tracker.id))
	);

	constructor(store: ProjectStore) {
		this.store = store;
	}

	/** The model that new trackers get: the one chosen, else the one used last, else the first of the library. */
	get model(): TrackerModel | null {
		const chosen = this.#modelId === null ? null : this.store.modelOf(this.#modelId);
		const last = this.store.layout.trackers.at(-1);
		return chosen ?? (last ? this.store.modelOf(last.modelId) : null) ?? this.store.models[0] ?? null;
	}

	set model(model: TrackerModel | null) {
		this.#modelId = model?.id ?? null;
	}

	/** Axis height that new trackers get, metres: the one chosen, else that of the last tracker of the model, else the model's. */
	get axisHeightM(): number {
		const { model } = this;
		if (!model) return 0;
		if (this.#axis?.modelId === model.id) return this.#axis.heightM;
		const last = this.store.layout.trackers.findLast(({ modelId }) => modelId === model.id);
		return last?.axisHeightM ?? model.axisHeightM;
	}

	set axisHeightM(heightM: number | null) {
		const { model } = this;
		this.#axis = model && heightM !== null ? { modelId: model.id, heightM } : null;
	}

	/** As trackers keep it: null is the model's own. */
	get newAxisHeightM(): number | null {
		return this.axisHeightM === this.model?.axisHeightM ? null : this.axisHeightM;
	}

	/** Changes the axis height of trackers in one undo step; new ones then follow the last that stands. */
	changeAxis(label: string, ids: ReadonlySet<string>, axisHeightM: number | null): void {
		this.#axis = null;
		this.store.replaceLayout(label, changeTrackers(this.store.layout, ids, { axisHeightM }));
	}

	useTool(tool: ToolId): void {
		this.cancelGesture();
		this.tool = tool;
	}

	onCancel(cancel: (() => boolean) | null): void {
		this.#cancelTool = cancel;
	}

	/** Gives up what is under way; answers false when nothing was. */
	cancelGesture(): boolean {
		const had = this.#cancelTool?.() ?? false;
		this.store.cancel();
		this.ghosts = [];
		this.guides = [];
		this.box = null;
		this.measured = null;
		return had;
	}

	select(ids: string[]): void {
		this.selected = ids;
	}

	/** Brings trackers into view and selects them. */
	flyTo(ids: string[]): void {
		this.selected = ids;
		this.flight = { ids, count: this.flight.count + 1 };
	}

	/** Adds trackers at points with the chosen model and automatic tags; selects them. One undo step. */
	addPoints(
		label: string,
		points: readonly PlanPoint[],
		options: { turnDeg?: number; rowToleranceM?: number; replace?: boolean } = {}
	): void {
		const { model, store } = this;
		if (!model || points.length === 0 || store.readOnly) return;
		const base = options.replace
			? removeTrackers(store.layout, new Set(store.layout.trackers.map(({ id }) => id)))
			: store.layout;
		const tags =
			points.length === 1
				? [tagForOne(base.trackers, points[0])]
				: nextTags(
						base.trackers.map(({ tag }) => tag),
						points,
						{ turnDeg: options.turnDeg, rowToleranceM: options.rowToleranceM }
					);
		const added = points.map((point, index) => ({
			id: newTrackerId(),
			tag: tags[index],
			point,
			axisHeightM: this.newAxisHeightM
		}));
		store.replaceLayout(label, addTrackers(base, model, added));
		this.selected = added.map(({ id }) => id);
		this.said = `${added.length === 1 ? `${added[0].tag} placed` : `${added.length} trackers placed`}.`;
	}
}

/** A random identifier; works on plain http too, where `randomUUID` is missing. */
export function newTrackerId(): string {
	const bytes = crypto.getRandomValues(new Uint8Array(10));
	return `t-${Array.from(bytes, (byte) => byte.toString(16).padStart(2, '0')).join('')}`;
}

const contextKey = Symbol('editor');

export function setEditor(editor: Editor): Editor {
	return setContext(contextKey, editor);
}

export function getEditor(): Editor {
	return getContext<Editor>(contextKey);
}
