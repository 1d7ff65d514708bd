import { getContext, setContext } from 'svelte';
import { can } from '$lib/access';
import {
	checkLayout,
	dayOfDate,
	fieldShade,
	isMeasured,
	type DayShade,
	type Layout,
	type Plot,
	type TrackerModel,
	type WinterVerdict
} from '$lib/core';
import { FieldCache } from './field-cache';
import { emptyHistory, recordStep, redoStep, undoStep, type History } from './history';
import { mergeLayouts, mergePlots } from './kernels/merge-documents';
import { Moment } from './moment.svelte';
import { PreviewClient } from './preview-client';
import type { Documents, ProjectData, ProjectInfo } from './project-data';
import { DocumentSync, type SaveState } from './sync.svelte';
import { httpTransport } from './transport';

export type { SaveState } from './sync.svelte';
export type { ProjectData, ProjectInfo } from './project-data';

const previewQuietMs = 120;
const previewStepMinutes = 5;
const worstFirst: SaveState[] = ['stale', 'offline', 'saving', 'unsaved', 'saved'];

interface EditOptions {
	/** Edits in quick succession with one key become one undo step. */
	mergeKey?: string;
}

/**
 * The documents of one project page, their history and their saving, and the moment that is looked at. Documents are replaced
 * and never changed in place. Made from load data in the project layout; `connect()` in an effect starts what needs a browser.
 */
export class ProjectStore {
	project = $state.raw<ProjectInfo>(undefined as never);
	plot = $state.raw<Plot>(undefined as never);
	layout = $state.raw<Layout>(undefined as never);
	models = $state.raw<TrackerModel[]>([]);
	layoutId = $state('');
	layoutName = $state('');
	readonly moment: Moment;

	/** The chosen day computed beside the page; null until it is there. */
	day = $state.raw<DayShade | null>(null);
	shortestDay = $state.raw<DayShade | null>(null);
	verdict = $state.raw<WinterVerdict | null>(null);
	/** Time that the last preview took to compute, milliseconds. */
	previewMs = $state<number | null>(null);
	previewFailure = $state<string | null>(null);

	#plotSync = $state.raw<DocumentSync<Plot>>(undefined as never);
	#layoutSync = $state.raw<DocumentSync<Layout>>(undefined as never);
	#history = $state.raw<History<Documents>>(emptyHistory());
	#gesture = $state.raw<{ label: string; before: Documents } | null>(null);
	#fields = new FieldCache();
	#userId: string;
	#connected = false;
	#preview: PreviewClient | null = null;

	readonly readOnly = $derived(!can(this.project.role, 'layout.edit'));
	readonly field = $derived.by(() => this.#fields.get(this.project.place, this.plot, this.layout));
	/** Shaded share of each tracker at the chosen moment, in layout order. */
	readonly shares = $derived.by(() => fieldShade(this.field, this.sun, this.dayOfYear));
	readonly findings = $derived(checkLayout(this.plot, this.layout));
	readonly canUndo = $derived(this.#history.done.length > 0 && !this.readOnly);
	readonly canRedo = $derived(this.#history.undone.length > 0 && !this.readOnly);
	readonly undoLabel = $derived(this.#history.done.at(-1)?.label ?? null);
	readonly redoLabel = $derived(this.#history.undone.at(-1)?.label ?? null);
	readonly inGesture = $derived(this.#gesture !== null);

	constructor(data: ProjectData, nowMs: number = Date.now()) {
		this.#userId = data.userId ?? '';
		this.project = data.project;
		this.models = data.models ?? [];
		this.plot = data.plot.document;
		this.layout = data.layout.document;
		this.layoutId = data.layout.id;
		this.layoutName = data.layout.name;
		this.#plotSync = this.#makePlotSync(data);
		this.#layoutSync = this.#makeLayoutSync(data);
		this.moment = new Moment(() => this.project.place, nowMs);
	}

	get plotRevision(): number {
		return this.#plotSync.revision;
	}

	get layoutRevision(): number {
		return this.#layoutSync.revision;
	}

	get saveState(): SaveState {
		const states = [this.#plotSync.state, this.#layoutSync.state];
		if (this.newerElsewhere) return 'stale';
		return worstFirst.find((state) => states.includes(state)) ?? 'saved';
	}

	/** Whether closing the page would lose nothing: all is saved, or kept on this device until it is. */
	get safeToLeave(): boolean {
		return this.#plotSync.kept && this.#layoutSync.kept;
	}

	/** Why something is not saved, as a sentence. */
	get saveMessage(): string | null {
		return this.#layoutSync.message ?? this.#plotSync.message;
	}

	/** A newer revision of a document is stored and not shown here. */
	get newerElsewhere(): boolean {
		return this.#plotSync.newer !== null || this.#layoutSync.newer !== null;
	}

	get plotConflict() {
		return this.#plotSync.conflict;
	}

	get layoutConflict() {
		return this.#layoutSync.conflict;
	}

	/** The site's date that is looked at; setting it keeps the clock time. */
	get date(): string {
		return this.moment.date;
	}

	set date(iso: string) {
		this.moment.date = iso;
	}

	/** UTC milliseconds; setting it sets the date as well. */
	get timeMs(): number {
		return this.moment.timeMs;
	}

	set timeMs(ms: number) {
		this.moment.timeMs = ms;
	}

	/** Apparent direction of the sun at the chosen moment. */
	get sun(): { azimuthDeg: number; elevationDeg: number } {
		return this.moment.sun;
	}

	/** Of the chosen date, 1..366: trees stand in leaf or bare. */
	get dayOfYear(): number {
		return dayOfDate(this.moment.date);
	}

	get utcOffsetMinutes(): number {
		return this.moment.utcOffsetMinutes;
	}

	/** Dates worth a jump in the year that is looked at. */
	get jumps(): { shortest: string; longest: string; equinox: string } {
		return this.moment.jumps;
	}

	modelOf(modelId: string): TrackerModel | null {
		return (
			this.layout.models.find((model) => model.id === modelId) ??
			this.models.find((model) => model.id === modelId) ??
			null
		);
	}

	/** Edits a copy of the plot: one undo step, or part of the gesture that is under way. */
	editPlot(label: string, edit: (draft: Plot) => void, options: EditOptions = {}): void {
		// Measured ground is large and only ever replaced whole: it is shared, and so is the surface made from it.
		const { ground, ...rest } = this.plot;
		const draft: Plot = {
			...structuredClone(rest),
			ground: isMeasured(ground) ? ground : structuredClone(ground)
		};
		edit(draft);
		this.#apply(label, { plot: draft, layout: this.layout }, options);
	}

	/** Edits a copy of the layout: one undo step, or part of the gesture that is under way. */
	editLayout(label: string, edit: (draft: Layout) => void, options: EditOptions = {}): void {
		const draft = structuredClone(this.layout);
		edit(draft);
		this.replaceLayout(label, draft, options);
	}

	/** As `editLayout`, for callers that build the next layout themselves and share what has not changed. */
	replaceLayout(label: string, layout: Layout, options: EditOptions = {}): void {
		this.#apply(label, { plot: this.plot, layout }, options);
	}

	/** Starts a gesture: whatever is edited until `commit()` is one undo step and is saved once. */
	begin(label: string): void {
		if (this.readOnly) return;
		if (this.#gesture) this.commit();
		this.#gesture = { label, before: this.#documents() };
	}

	commit(): void {
		const gesture = this.#gesture;
		this.#gesture = null;
		if (!gesture) return;
		this.#record(gesture.label, gesture.before, null);
	}

	/** Ends the gesture as if it had never begun. */
	cancel(): void {
		const gesture = this.#gesture;
		this.#gesture = null;
		if (gesture) this.#show(gesture.before);
	}

	undo(): void {
		this.cancel();
		if (this.readOnly) return;
		this.#travel(undoStep(this.#history));
	}

	redo(): void {
		this.cancel();
		if (this.readOnly) return;
		this.#travel(redoStep(this.#history));
	}

	/** Sends pending edits now, for example before a run is started. */
	async saveNow(): Promise<void> {
		await Promise.all([this.#plotSync.flush(), this.#layoutSync.flush()]);
	}

	async keepMine(): Promise<void> {
		await Promise.all([this.#plotSync.keepMine(), this.#layoutSync.keepMine()]);
	}

	/** Shows the other version; mine stays one undo away. */
	takeTheirs(): void {
		const before = this.#documents();
		const plot = this.#plotSync.takeTheirs();
		const layout = this.#layoutSync.takeTheirs();
		if (!plot && !layout) return;
		this.#show({ plot: plot?.document ?? before.plot, layout: layout?.document ?? before.layout });
		this.#history = recordStep(this.#history, {
			label: 'Take the other version',
			before,
			after: this.#documents(),
			mergeKey: null,
			atMs: Date.now()
		});
	}

	/** Asks whether a newer version was saved elsewhere; true when fresh page data can be taken over with nothing lost. */
	async look(): Promise<boolean> {
		const newer = await Promise.all([this.#plotSync.look(), this.#layoutSync.look()]);
		return newer.includes(true) && this.#gesture === null;
	}

	/** Both versions in one, when neither changed what the other did; null when somebody must choose. */
	readonly bothVersions = $derived.by((): Documents | null => {
		const { conflict: plots } = this.#plotSync;
		const { conflict: layouts } = this.#layoutSync;
		if (!plots && !layouts) return null;
		const plot = plots?.base ? mergePlots(plots.base, plots.mine, plots.theirs) : null;
		const layout = layouts?.base ? mergeLayouts(layouts.base, layouts.mine, layouts.theirs) : null;
		if ((plots && !plot?.ok) || (layouts && !layout?.ok)) return null;
		return {
			plot: plot?.ok ? plot.value : this.plot,
			layout: layout?.ok ? layout.value : this.layout
		};
	});

	/** Shows and saves both versions in one; mine alone stays one undo away. */
	async keepBoth(): Promise<void> {
		const both = this.bothVersions;
		if (!both) return;
		this.cancel();
		const before = this.#documents();
		this.#show(both);
		this.#history = recordStep(this.#history, {
			label: 'Keep both versions',
			before,
			after: both,
			mergeKey: null,
			atMs: Date.now()
		});
		await Promise.all([this.#plotSync.settleWith(both.plot), this.#layoutSync.settleWith(both.layout)]);
	}

	/** Takes over freshly loaded page data: always the project's facts, documents only when they are newer and nothing is pending. */
	adopt(data: ProjectData): void {
		this.project = data.project;
		this.models = data.models ?? this.models;
		const plotIsNewer = data.plot.revision > this.plotRevision && !this.#plotSync.hasPending;
		if (plotIsNewer && !this.#gesture) {
			this.#plotSync.adopt(data.plot.revision, data.plot.document);
			this.plot = data.plot.document;
			this.#history = emptyHistory();
		}
		if (data.layout.id !== this.layoutId) this.#openLayout(data);
		else if (data.layout.revision > this.layoutRevision && !this.#layoutSync.hasPending && !this.#gesture) {
			this.#layoutSync.adopt(data.layout.revision, data.layout.document);
			this.layout = data.layout.document;
			this.#history = emptyHistory();
		}
		this.layoutName = data.layout.name;
	}

	/** Starts saving, restoring and the preview in the browser; answers what stops them. Call inside an effect. */
	connect(): () => void {
		this.#connected = true;
		this.#restore();
		const online = (): void => {
			this.#plotSync.online();
			this.#layoutSync.online();
		};
		const hidden = (): void => {
			if (document.visibilityState === 'hidden') void this.saveNow();
		};
		const leaving = (event: BeforeUnloadEvent): void => {
			if (!this.safeToLeave) event.preventDefault();
		};
		window.addEventListener('online', online);
		window.addEventListener('beforeunload', leaving);
		document.addEventListener('visibilitychange', hidden);
		this.#preview = new PreviewClient(
			(answer) => {
				this.day = answer.day;
				this.shortestDay = answer.shortestDay;
				this.verdict = answer.verdict;
				this.previewMs = answer.computeMs;
				this.previewFailure = null;
			},
			(message) => (this.previewFailure = message)
		);
		const stopPreview = $effect.root(() => {
			$effect(() => this.#askPreview());
		});
		return () => {
			window.removeEventListener('online', online);
			window.removeEventListener('beforeunload', leaving);
			document.removeEventListener('visibilitychange', hidden);
			stopPreview();
			this.#preview?.close();
			this.#preview = null;
			this.#connected = false;
			void this.saveNow();
			this.#plotSync.close();
			this.#layoutSync.close();
		};
	}

	#askPreview(): () => void {
		const request = {
			place: this.project.place,
			plot: this.plot,
			layout: this.layout,
			winterRule: this.project.winterRule,
			date: this.date,
			shortestDate: this.jumps.shortest,
			stepMinutes: previewStepMinutes,
			utcOffsetMinutes: this.utcOffsetMinutes
		};
		const timer = setTimeout(() => this.#preview?.ask(request), previewQuietMs);
		return () => clearTimeout(timer);
	}

	#documents(): Documents {
		return { plot: this.plot, layout: this.layout };
	}

	#apply(label: string, next: Documents, options: EditOptions): void {
		if (this.readOnly) return;
		const before = this.#documents();
		this.plot = next.plot;
		this.layout = next.layout;
		if (!this.#gesture) this.#record(label, before, options.mergeKey ?? null);
	}

	#record(label: string, before: Documents, mergeKey: string | null): void {
		const after = this.#documents();
		if (before.plot === after.plot && before.layout === after.layout) return;
		this.#history = recordStep(this.#history, { label, before, after, mergeKey, atMs: Date.now() });
		this.#changed(before);
	}

	#travel(step: { history: History<Documents>; state: Documents } | null): void {
		if (!step) return;
		const before = this.#documents();
		this.#history = step.history;
		this.#show(step.state);
		this.#changed(before);
	}

	#show(documents: Documents): void {
		this.plot = documents.plot;
		this.layout = documents.layout;
	}

	#changed(before: Documents): void {
		if (before.plot !== this.plot) this.#plotSync.changed(this.plot);
		if (before.layout !== this.layout) this.#layoutSync.changed(this.layout);
	}

	#openLayout(data: ProjectData): void {
		this.cancel();
		void this.#layoutSync.flush();
		this.#layoutSync = this.#makeLayoutSync(data);
		this.layout = data.layout.document;
		this.layoutId = data.layout.id;
		this.#history = emptyHistory();
		if (this.#connected && !this.readOnly) {
			this.layout = this.#layoutSync.restore(this.layout) ?? this.layout;
		}
	}

	#restore(): void {
		if (this.readOnly) return;
		this.plot = this.#plotSync.restore(this.plot) ?? this.plot;
		this.layout = this.#layoutSync.restore(this.layout) ?? this.layout;
	}

	#makePlotSync(data: ProjectData): DocumentSync<Plot> {
		return new DocumentSync({
			transport: httpTransport<Plot>(`/api/v1/projects/${data.project.id}/plot`),
			storage: deviceStorage(),
			storageKey: `tiltyard.pending.${this.#userId}.plot.${data.project.id}`,
			revision: data.plot.revision,
			document: data.plot.document
		});
	}

	#makeLayoutSync(data: ProjectData): DocumentSync<Layout> {
		return new DocumentSync({
			transport: httpTransport<Layout>(`/api/v1/layouts/${data.layout.id}`),
			storage: deviceStorage(),
			storageKey: `tiltyard.pending.${this.#userId}.layout.${data.layout.id}`,
			revision: data.layout.revision,
			document: data.layout.document
		});
	}
}

function deviceStorage(): Storage | null {
	try {
		return typeof localStorage === 'undefined' ? null : localStorage;
	} catch {
		// A browser that forbids storage throws on the mere mention; work then lives in memory until it is saved.
		return null;
	}
}

const contextKey = Symbol('project-store');

export function setProjectStore(store: ProjectStore): ProjectStore {
	return setContext(contextKey, store);
}

export function getProjectStore(): ProjectStore {
	return getContext<ProjectStore>(contextKey);
}
