import { obstacleExtent, type BoundaryPart, type Obstacle, type PlanPoint, type Plot } from '$lib/core';
import {
	MAX_BOUNDARY_CORNERS,
	MAX_FOOTPRINT_CORNERS,
	MAX_OBSTACLES,
	MAX_OFFSET_M,
	MAX_WALL_POINTS,
	wallLineProblem
} from '$lib/schema';
import { ringProblems, ringProblemSentence } from '$lib/schema/plot-checks';
import { extentOf, type PlanBox } from '../kernels/pick';
import { fitBox, panBy, zoomAt, type Margins, type PlanCamera } from '../kernels/plan-camera';
import type { ProjectStore } from '../project-store.svelte';
import {
	boundaryProblem,
	cornerAt,
	insertCorner,
	moveCorner,
	partFromCorners,
	removeCorner,
	toCentimetre,
	turnRings,
	type CornerRef
} from './boundary-edit';
import { newBox, newBuilding, newMast, newTree, newWall } from './obstacle-edit';

/** Tools that place an obstacle with one click. */
export type PlaceTool = 'box' | 'tree' | 'mast';
/** Tools that draw corner by corner: the boundary, a footprint, the line of a wall. */
export type DrawTool = 'draw' | 'building' | 'wall';
export type PlotTool = 'select' | DrawTool | PlaceTool;
export type PlotCard = 'boundary' | 'ground' | 'skyline' | 'obstacles' | 'obstacle';

/** Half the side of the ground that an empty plot shows, metres. */
const EMPTY_REACH_M = 90;
/** More corners than this are not checked while one of them is being dragged, only when it is let go. */
const LIVE_CHECK_CORNERS = 500;

/**
 * What the Plot page is doing: tool, selection, the outline being drawn, the open card and the look at the ground. Everything
 * that changes the plot goes through the store.
 */
export class PlotDesk {
	tool = $state<PlotTool>('select');
	card = $state<PlotCard | null>(null);
	corner = $state.raw<CornerRef | null>(null);
	obstacleId = $state<string | null>(null);
	/** Corners set so far with the drawing tool. */
	draft = $state.raw<PlanPoint[]>([]);
	/** Ground under the pointer. */
	pointer = $state.raw<PlanPoint | null>(null);
	/** Something that could not be done, in a sentence. */
	message = $state<string | null>(null);
	camera = $state.raw<PlanCamera>({ eastM: 0, northM: 0, pxPerM: 4, widthPx: 0, heightPx: 0 });
	/** Why the corner under the pointer can't stay where it is. */
	dragProblem = $state<string | null>(null);

	readonly store: ProjectStore;
	#moving = false;

	readonly obstacle = $derived.by(
		() => this.store.plot.obstacles.find((obstacle) => obstacle.id === this.obstacleId) ?? null
	);
	readonly cornerCount = $derived.by(() => countCorners(this.store.plot.boundary));

	constructor(store: ProjectStore) {
		this.store = store;
	}

	/** The tool that corners are drawn with, or null. */
	get drawing(): DrawTool | null {
		return this.tool === 'draw' || this.tool === 'building' || this.tool === 'wall' ? this.tool : null;
	}

	/** The tool that places an obstacle with a click, or null. */
	get placing(): PlaceTool | null {
		return this.tool === 'box' || this.tool === 'tree' || this.tool === 'mast' ? this.tool : null;
	}

	/** Fewest corners that what is being drawn can have. */
	get leastCorners(): number {
		return this.tool === 'wall' ? 2 : 3;
	}

	get plot(): Plot {
		return this.store.plot;
	}

	get readOnly(): boolean {
		return this.store.readOnly;
	}

	choose(tool: PlotTool): void {
		if (this.readOnly) return;
		this.message = null;
		if (tool !== this.tool) this.draft = [];
		this.tool = tool;
		this.corner = null;
		if (tool !== 'select') this.card = null;
	}

	open(card: PlotCard | null): void {
		this.card = card;
		if (card !== 'obstacle') this.obstacleId = null;
		if (card !== 'boundary') this.corner = null;
	}

	clearSelection(): void {
		this.corner = null;
		if (this.card === 'obstacle') this.open(null);
	}

	selectCorner(ref: CornerRef | null): void {
		this.corner = ref;
		if (ref) {
			this.obstacleId = null;
			this.card = 'boundary';
		}
	}

	selectObstacle(id: string): void {
		this.corner = null;
		this.obstacleId = id;
		this.card = 'obstacle';
	}

	/* The look at the ground */

	resize(widthPx: number, heightPx: number, margins: Margins): void {
		const first = this.camera.widthPx === 0;
		this.camera = { ...this.camera, widthPx, heightPx };
		if (first) this.fit(margins);
	}

	fit(margins: Margins, extra: readonly BoundaryPart[] = []): void {
		this.camera = fitBox(this.camera, this.#landBox(extra), margins);
	}

	zoom(factor: number, x = this.camera.widthPx / 2, y = this.camera.heightPx / 2): void {
		this.camera = zoomAt(this.camera, x, y, factor);
	}

	pan(dx: number, dy: number): void {
		this.camera = panBy(this.camera, dx, dy);
	}

	#landBox(extra: readonly BoundaryPart[]): PlanBox {
		const parts = extra.length > 0 ? extra : this.plot.boundary;
		const points = parts.flatMap((part) => part.outer);
		if (extra.length === 0) {
			for (const obstacle of this.plot.obstacles) {
				const [west, south, east, north] = obstacleExtent(obstacle);
				points.push([west, south], [east, north]);
			}
			for (const tracker of this.store.layout.trackers) points.push([tracker.eastM, tracker.northM]);
		}
		const box = extentOf(points);
		return (
			box ?? { westM: -EMPTY_REACH_M, eastM: EMPTY_REACH_M, southM: -EMPTY_REACH_M, northM: EMPTY_REACH_M }
		);
	}

	/* Drawing an outline */

	addDraftCorner(point: PlanPoint): void {
		this.message = null;
		const problem = this.#obstacleDraftProblem(point);
		if (problem) {
			this.message = problem;
			return;
		}
		if (this.tool === 'draw' && this.cornerCount + this.draft.length >= MAX_BOUNDARY_CORNERS) {
			this.message = `A boundary holds at most ${MAX_BOUNDARY_CORNERS} corners: finish this outline with fewer.`;
			return;
		}
		this.draft = [...this.draft, toCentimetre(point)];
	}

	/** Why a further corner of a footprint or wall can't be set. */
	#obstacleDraftProblem(point: PlanPoint): string | null {
		if (this.tool !== 'building' && this.tool !== 'wall') return null;
		const most = this.tool === 'wall' ? MAX_WALL_POINTS : MAX_FOOTPRINT_CORNERS;
		if (this.draft.length >= most) return `At most ${most} corners: finish with these.`;
		const [first] = this.draft;
		const far =
			first && Math.max(Math.abs(point[0] - first[0]), Math.abs(point[1] - first[1])) > MAX_OFFSET_M;
		return far ? `This is more than ${MAX_OFFSET_M} m from the first corner: begin nearer.` : null;
	}

	dropDraftCorner(): void {
		this.message = null;
		this.draft = this.draft.slice(0, -1);
	}

	cancelDraft(): void {
		this.message = null;
		if (this.draft.length > 0) this.draft = [];
		else this.tool = 'select';
	}

	/** Closes the outline; one that can't be land stays open, with the reason. */
	closeDraft(): void {
		if (this.tool === 'building') this.#closeBuilding();
		else if (this.tool === 'wall') this.#closeWall();
		else this.#closeOutline();
	}

	#closeBuilding(): void {
		const [problem] = ringProblems(this.draft);
		if (problem) this.message = ringProblemSentence(problem, 'The footprint');
		else this.#add('Draw a building', newBuilding(crypto.randomUUID(), this.draft, this.plot.obstacles));
	}

	#closeWall(): void {
		const problem = wallLineProblem(this.draft);
		if (problem) this.message = problem;
		else this.#add('Draw a wall', newWall(crypto.randomUUID(), this.draft, this.plot.obstacles));
	}

	#closeOutline(): void {
		const [problem] = ringProblems(this.draft);
		if (problem) {
			this.message = ringProblemSentence(problem, 'The outline');
			return;
		}
		const part = partFromCorners(this.draft);
		this.store.editPlot('Draw the boundary', (draft) => {
			draft.boundary.push(part);
		});
		this.draft = [];
		this.message = null;
		this.tool = 'select';
		this.card = 'boundary';
	}

	/* Corners and obstacles */

	/** Starts moving a corner; with `insert` a new one after it, which the drag then moves. */
	beginCorner(ref: CornerRef, insertAt: PlanPoint | null): void {
		this.message = null;
		this.store.begin(insertAt ? 'Insert a corner' : 'Move a corner');
		this.#moving = true;
		if (!insertAt) return;
		let inserted = ref;
		this.store.editPlot('Insert a corner', (draft) => (inserted = insertCorner(draft, ref, insertAt)));
		this.selectCorner(inserted);
	}

	dragCorner(point: PlanPoint): void {
		const ref = this.corner;
		if (!this.#moving || !ref) return;
		this.store.editPlot('Move a corner', (draft) => moveCorner(draft, ref, point));
		this.dragProblem = this.cornerCount <= LIVE_CHECK_CORNERS ? boundaryProblem(this.plot.boundary) : null;
	}

	/** Ends the drag; a corner that spoils the outline goes back to where it was. */
	endCorner(): void {
		if (!this.#moving) return;
		this.#moving = false;
		this.dragProblem = null;
		const problem = boundaryProblem(this.plot.boundary);
		if (problem) {
			this.store.cancel();
			this.corner = null;
			this.message = `${problem} The corner went back to where it was.`;
			return;
		}
		this.#turnRings();
		this.store.commit();
	}

	beginObstacle(id: string): void {
		this.message = null;
		this.selectObstacle(id);
		this.store.begin('Move an obstacle');
		this.#moving = true;
	}

	dragObstacle(point: PlanPoint): void {
		const id = this.obstacleId;
		if (!this.#moving || id === null) return;
		const [eastM, northM] = toCentimetre(point);
		this.store.editPlot('Move an obstacle', (draft) => {
			const obstacle = draft.obstacles.find((candidate) => candidate.id === id);
			if (obstacle) Object.assign(obstacle, { eastM, northM });
		});
	}

	endObstacle(): void {
		if (!this.#moving) return;
		this.#moving = false;
		this.store.commit();
	}

	cancelMove(): void {
		this.#moving = false;
		this.dragProblem = null;
		this.store.cancel();
	}

	/** Tries an edit of the boundary; answers the reason when it would spoil it, and then changes nothing. */
	tryBoundary(label: string, edit: (draft: Plot) => void): string | null {
		const trial = structuredClone(this.plot);
		edit(trial);
		const problem = boundaryProblem(trial.boundary);
		if (problem) return problem;
		this.message = null;
		turnRings(trial);
		this.store.editPlot(label, (draft) => void (draft.boundary = trial.boundary));
		return null;
	}

	removeCorner(ref: CornerRef): void {
		const problem = this.tryBoundary('Take out a corner', (draft) => removeCorner(draft, ref));
		if (problem) this.message = `Without this corner the outline fails. ${problem}`;
		else this.corner = null;
	}

	removeBoundary(): void {
		this.store.editPlot('Remove the boundary', (draft) => void (draft.boundary = []));
		this.corner = null;
	}

	place(kind: PlaceTool, point: PlanPoint): void {
		const make = { box: newBox, tree: newTree, mast: newMast }[kind];
		this.#add(`Place a ${kind}`, make(crypto.randomUUID(), point, this.plot.obstacles));
	}

	#add(label: string, obstacle: Obstacle): void {
		if (this.plot.obstacles.length >= MAX_OBSTACLES) {
			this.message = `A plot holds at most ${MAX_OBSTACLES} obstacles: delete one first.`;
			return;
		}
		this.store.editPlot(label, (draft) => {
			draft.obstacles.push(obstacle);
		});
		this.draft = [];
		this.message = null;
		this.tool = 'select';
		this.selectObstacle(obstacle.id);
	}

	editObstacle(id: string, label: string, change: Partial<Obstacle>): void {
		this.store.editPlot(label, (draft) => {
			const obstacle = draft.obstacles.find((candidate) => candidate.id === id);
			if (obstacle) Object.assign(obstacle, change);
		});
	}

	removeObstacle(id: string): void {
		this.store.editPlot('Delete an obstacle', (draft) => {
			draft.obstacles = draft.obstacles.filter((obstacle) => obstacle.id !== id);
		});
		this.open('obstacles');
	}

	/** Moves what is selected by some metres; one undo step for keys in quick succession. */
	nudge(eastM: number, northM: number): void {
		const { corner, obstacle } = this;
		if (corner) {
			const at = cornerAt(this.plot.boundary, corner);
			if (!at) return;
			const problem = this.tryBoundary('Move a corner', (draft) =>
				moveCorner(draft, corner, [at[0] + eastM, at[1] + northM])
			);
			if (problem) this.message = `${problem} The corner stays where it was.`;
		} else if (obstacle) {
			const [east, north] = toCentimetre([obstacle.eastM + eastM, obstacle.northM + northM]);
			this.editObstacle(obstacle.id, 'Move an obstacle', { eastM: east, northM: north });
		}
	}

	removeSelected(): void {
		if (this.corner) this.removeCorner(this.corner);
		else if (this.obstacleId) this.removeObstacle(this.obstacleId);
	}

	#turnRings(): void {
		const before = JSON.stringify(this.plot.boundary);
		const trial = structuredClone(this.plot);
		turnRings(trial);
		if (JSON.stringify(trial.boundary) === before) return;
		this.store.editPlot('Move a corner', (draft) => turnRings(draft));
		this.corner = null;
	}
}

export function countCorners(boundary: readonly BoundaryPart[]): number {
	return boundary.reduce(
		(sum, part) => sum + part.outer.length + part.holes.reduce((inner, hole) => inner + hole.length, 0),
		0
	);
}
