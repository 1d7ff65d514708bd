import { RADIANS_PER_DEGREE, tableAxes } from '../conventions';
import type { Aim } from '../machine/aim';
import { AlikeView } from './alike-view';
import { hullOrder } from './hull';
import { LitPieces, flatArea } from './pieces';
import { RectUnion } from './rect-union';
import { TIERS, type SectorLists } from './sector-lists';
import { ShadowUnion } from './shadow-union';
import { passesOn, type Solid } from './solid';
import { ViewGrid } from './view-grid';

/** Tables that share sizes and, at any one moment, their pose. */
export interface TableGroup {
	/** Half of the glass, metres. */
	halfWidth: number;
	halfHeight: number;
	/** Half of the steel outline, which is what throws the shadow, metres. */
	steelHalfWidth: number;
	steelHalfHeight: number;
	/** Half of the clear slot in the middle; 0 is none. */
	halfGap: number;
	/** The middle of the glass is never farther than this from the fixed point, metres. */
	offsetReach: number;
	/** Where it points at a sun. */
	aimAt(azimuthDeg: number, elevationDeg: number): Aim;
	/** Pose at a sun: bearing, tilt and the way from the fixed point of a table to its middle. */
	poseAt(azimuthDeg: number, elevationDeg: number): AimedPose;
}

export interface AimedPose {
	azimuthDeg: number;
	tiltDeg: number;
	offset: readonly [number, number, number];
}

/** Ground near the tables, rising between them and the light. */
export interface TableHorizons {
	/** Whether it hides light from this direction from the middle of table i. Degrees. */
	hides(i: number, azimuthDeg: number, elevationDeg: number): boolean;
}

/** A table counts as turned away from the sun below this cosine. */
const LEAST_COSINE = 1e-6;
/** Shaders must stand this far up-sun, metres along the target's normal. */
const UP_SUN_M = 1e-7;
const LEAST_SHADOW_M2 = 1e-13;
const MOST_SHADOW_CORNERS = 256;

/** Where one group's tables point at the present sun. */
export class GroupPose {
	aim: AimedPose | null = null;
	azimuthDeg = 0;
	tiltDeg = 0;
	offset: readonly [number, number, number] = [0, 0, 0];
	u: readonly number[] = [1, 0, 0];
	v: readonly number[] = [0, 1, 0];
	n: readonly number[] = [0, 0, 1];
	/** n.s */
	cosine = 1;
	// Projections along the sun on the table's plane: U, V give table coordinates, D the distance up-sun.
	ux = 0;
	uy = 0;
	uz = 0;
	vx = 0;
	vy = 0;
	vz = 0;
	/** Offset and half extents in the sun's view. */
	viewX = 0;
	viewY = 0;
	extentX = 0;
	extentY = 0;
	private readonly packed = new Float64Array(9);

	/** U, V and n side by side. */
	axes(): Float64Array {
		const { packed, n } = this;
		packed[0] = this.ux;
		packed[1] = this.uy;
		packed[2] = this.uz;
		packed[3] = this.vx;
		packed[4] = this.vy;
		packed[5] = this.vz;
		packed[6] = n[0];
		packed[7] = n[1];
		packed[8] = n[2];
		return packed;
	}
}

/**
 * Exact shade of a set of tables and solids under one sun at a time.
 *
 * Who can shade whom is found in the sun's view: the plane square to the sun. One thing can shade another only where
 * their outlines overlap in that view, whatever the poses, so each table's outline box goes into a flat grid and only
 * boxes that overlap are looked at. This needs memory in proportion to the number of tables and is safe when stops
 * clamp a pose. Pairs of one pose are axis-aligned rectangles (exact union); everything else is subtracted from the
 * target's lit pieces.
 */
export class ShadeEngine {
	readonly count: number;
	readonly poses: GroupPose[];
	private readonly viewX: Float64Array;
	private readonly viewY: Float64Array;
	private readonly grid = new ViewGrid();
	/** All tables are of one kind and nothing else throws shade: the quick way for the whole field. */
	private readonly alikeOnly: boolean;
	private readonly view: AlikeView;
	private readonly rects = new RectUnion();
	private readonly union = new ShadowUnion();
	private readonly pair = new Float64Array(9);
	private readonly pieces = new LitPieces();
	private readonly shadow = new Float64Array(2 * MOST_SHADOW_CORNERS);
	private readonly corners = new Float64Array(3 * MOST_SHADOW_CORNERS);
	private readonly hullX = new Float64Array(MOST_SHADOW_CORNERS);
	private readonly hullY = new Float64Array(MOST_SHADOW_CORNERS);
	private readonly hullIndex = new Int32Array(2 * MOST_SHADOW_CORNERS);
	/** Neighbours by sector of azimuth, while a run goes through one. */
	private lists: SectorLists | null = null;
	private tier = 0;
	private near = new Int32Array(64);
	private nearCount = 0;
	private readonly nearSolids: Int32Array;
	private nearSolidCount = 0;
	readonly solids: readonly Solid[];
	/** West, east, low, high of each solid in the sun's view. */
	private readonly solidBoxes: Float64Array;
	private readonly outlines: (Int32Array | null)[];
	/** Views of all solids together. */
	private solidsWest = 0;
	private solidsEast = 0;
	private solidsLow = 0;
	private solidsHigh = 0;
	/** Greatest half extents of any table in the view. */
	private widest = 0;
	private highest = 0;
	private s: [number, number, number] = [0, 0, 1];
	private axisX: [number, number, number] = [1, 0, 0];
	private axisY: [number, number, number] = [0, 1, 0];

	private lightAzimuthDeg = 0;
	private lightElevationDeg = 90;
	/** Share of the light that each solid lets through on the present day. */
	private readonly solidPasses: Float64Array;
	private seasonal = false;

	constructor(
		/** Fixed points of the tables, metres. */
		readonly east: Float64Array,
		readonly north: Float64Array,
		readonly up: Float64Array,
		/** Group of each table. */
		readonly groupOf: Int32Array,
		readonly groups: readonly TableGroup[],
		solids: readonly Solid[],
		/** Near ground that hides the light from single tables; null where there is none. */
		readonly horizons: TableHorizons | null = null
	) {
		this.count = east.length;
		this.poses = groups.map(() => new GroupPose());
		this.viewX = new Float64Array(this.count);
		this.viewY = new Float64Array(this.count);
		// Opaque ones first: what they take need not be cut again by a crown.
		this.solids = [...solids].sort((a, b) => a.passes - b.passes);
		this.solidBoxes = new Float64Array(4 * solids.length);
		this.outlines = solids.map(() => null);
		this.nearSolids = new Int32Array(solids.length);
		this.alikeOnly =
			groups.length === 1 && groups[0].halfGap === 0 && solids.length === 0 && horizons === null;
		this.view = new AlikeView(this, groups[0]);
		this.solidPasses = Float64Array.from(this.solids, (solid) => solid.passes);
		this.seasonal = this.solids.some((solid) => solid.leafPasses !== undefined);
	}

	/** Turns to a day of the year, 1..366: trees stand in leaf or bare. Bare until it is called. */
	setDay(dayOfYear: number): void {
		if (!this.seasonal) return;
		this.solids.forEach((solid, k) => (this.solidPasses[k] = passesOn(solid, dayOfYear)));
	}

	/**
	 * Turns everything to a sun. With `indexed` false no grid is built and each question walks all tables: cheaper
	 * when only a few tables are asked about.
	 */
	setSun(azimuthDeg: number, elevationDeg: number, indexed = true): void {
		this.setLight(azimuthDeg, elevationDeg, azimuthDeg, elevationDeg, indexed);
	}

	/**
	 * Turns everything to light `k` (from the first) of the sector that `lists` were made for: neighbours come from the
	 * lists. Only tables that the lists hold may be asked about.
	 */
	setSunOfSector(azimuthDeg: number, elevationDeg: number, lists: SectorLists, k: number): void {
		this.setLight(azimuthDeg, elevationDeg, azimuthDeg, elevationDeg, null);
		this.lists = lists;
		this.tier = lists.tierOf[k];
	}

	/** Tables stand as for a sun while the light comes from elsewhere: a piece of the sky. Degrees. */
	setLight(
		azimuthDeg: number,
		elevationDeg: number,
		lightAzimuthDeg: number,
		lightElevationDeg: number,
		/** Null when neighbours will come from lists. */
		indexed: boolean | null = true
	): void {
		this.lists = null;
		this.lightAzimuthDeg = lightAzimuthDeg;
		this.lightElevationDeg = lightElevationDeg;
		const a = lightAzimuthDeg * RADIANS_PER_DEGREE;
		const e = lightElevationDeg * RADIANS_PER_DEGREE;
		const sa = Math.sin(a);
		const ca = Math.cos(a);
		const se = Math.sin(e);
		const ce = Math.cos(e);
		const s = (this.s = [sa * ce, ca * ce, se]);
		const ax = (this.axisX = [-ca, sa, 0]);
		const ay = (this.axisY = [-sa * se, -ca * se, ce]);
		let widest = 0;
		let highest = 0;
		for (let g = 0; g < this.groups.length; g++) {
			const group = this.groups[g];
			const pose = this.poses[g];
			const aim = group.poseAt(azimuthDeg, elevationDeg);
			// A table that stands still answers with the same pose again and again.
			if (aim !== pose.aim) {
				pose.aim = aim;
				pose.azimuthDeg = aim.azimuthDeg;
				pose.tiltDeg = aim.tiltDeg;
				pose.offset = aim.offset;
				const axes = tableAxes(aim.azimuthDeg, aim.tiltDeg);
				pose.u = axes.u;
				pose.v = axes.v;
				pose.n = axes.n;
			}
			const { u, v, n } = pose;
			const cosine = dot(n, s);
			pose.cosine = cosine;
			if (Math.abs(cosine) > LEAST_COSINE) {
				const us = dot(u, s) / cosine;
				const vs = dot(v, s) / cosine;
				pose.ux = u[0] - us * n[0];
				pose.uy = u[1] - us * n[1];
				pose.uz = u[2] - us * n[2];
				pose.vx = v[0] - vs * n[0];
				pose.vy = v[1] - vs * n[1];
				pose.vz = v[2] - vs * n[2];
			}
			pose.viewX = dot(aim.offset, ax);
			pose.viewY = dot(aim.offset, ay);
			pose.extentX =
				group.steelHalfWidth * Math.abs(dot(u, ax)) + group.steelHalfHeight * Math.abs(dot(v, ax));
			pose.extentY =
				group.steelHalfWidth * Math.abs(dot(u, ay)) + group.steelHalfHeight * Math.abs(dot(v, ay));
			if (pose.extentX > widest) widest = pose.extentX;
			if (pose.extentY > highest) highest = pose.extentY;
		}
		const { east, north, up, viewX, viewY, groupOf, poses } = this;
		for (let i = 0; i < this.count; i++) {
			const pose = poses[groupOf[i]];
			viewX[i] = east[i] * ax[0] + north[i] * ax[1] + pose.viewX;
			viewY[i] = east[i] * ay[0] + north[i] * ay[1] + up[i] * ay[2] + pose.viewY;
		}
		this.setSolids();
		if (indexed) this.grid.build(viewX, viewY, this.count, 2 * widest, 2 * highest);
		else if (indexed === false) this.grid.leave(viewX, viewY, this.count);
		this.widest = widest;
		this.highest = highest;
	}

	private setSolids(): void {
		const { axisX: ax, axisY: ay, solidBoxes: boxes } = this;
		this.solidsWest = this.solidsLow = Infinity;
		this.solidsEast = this.solidsHigh = -Infinity;
		for (let k = 0; k < this.solids.length; k++) {
			const { vertices } = this.solids[k];
			let west = Infinity;
			let east = -Infinity;
			let low = Infinity;
			let high = -Infinity;
			for (let o = 0; o < vertices.length; o += 3) {
				const x = vertices[o] * ax[0] + vertices[o + 1] * ax[1];
				const y = vertices[o] * ay[0] + vertices[o + 1] * ay[1] + vertices[o + 2] * ay[2];
				if (x < west) west = x;
				if (x > east) east = x;
				if (y < low) low = y;
				if (y > high) high = y;
			}
			boxes[4 * k] = west;
			boxes[4 * k + 1] = east;
			boxes[4 * k + 2] = low;
			boxes[4 * k + 3] = high;
			this.outlines[k] = null;
			this.solidsWest = Math.min(this.solidsWest, west);
			this.solidsEast = Math.max(this.solidsEast, east);
			this.solidsLow = Math.min(this.solidsLow, low);
			this.solidsHigh = Math.max(this.solidsHigh, high);
		}
	}

	/** Cosine of the sun's angle to a table's front. */
	cosine(i: number): number {
		return this.poses[this.groupOf[i]].cosine;
	}

	/**
	 * Puts the fixed point of table i elsewhere, metres. Until the next light only tables found without an index may be
	 * asked about: set the sun with `indexed` false. Near skylines stay those of the old place.
	 */
	place(i: number, eastM: number, northM: number, upM: number): void {
		const { axisX: ax, axisY: ay } = this;
		this.east[i] = eastM;
		this.north[i] = northM;
		this.up[i] = upM;
		const pose = this.poses[this.groupOf[i]];
		this.viewX[i] = eastM * ax[0] + northM * ax[1] + pose.viewX;
		this.viewY[i] = eastM * ay[0] + northM * ay[1] + upM * ay[2] + pose.viewY;
	}

	/** Adds to `found`, behind the first `count`, every table whose outline meets that of table i in the light's view. */
	meeting(i: number, found: Int32Array, count: number): number {
		const { viewX, viewY, poses, groupOf } = this;
		const own = poses[groupOf[i]];
		const reachX = own.extentX + this.widest;
		const reachY = own.extentY + this.highest;
		const x = viewX[i];
		const y = viewY[i];
		let n = count;
		for (let j = 0; j < this.count; j++) {
			const dx = viewX[j] - x;
			if (dx >= reachX || -dx >= reachX) continue;
			const dy = viewY[j] - y;
			if (dy >= reachY || -dy >= reachY || j === i) continue;
			let known = false;
			for (let k = 0; k < count && !known; k++) known = found[k] === j;
			if (!known) found[n++] = j;
		}
		return n;
	}

	/** Middle of a table's glass, local frame, metres. */
	centre(i: number): [number, number, number] {
		const { offset } = this.poses[this.groupOf[i]];
		return [this.east[i] + offset[0], this.north[i] + offset[1], this.up[i] + offset[2]];
	}

	/** Finds what may shade table i, or a head up to `growM` outside it; returns how many tables and solids. */
	collect(i: number, growM = 0): number {
		const pose = this.poses[this.groupOf[i]];
		const { viewX, viewY, groupOf, poses, groups, grid } = this;
		const x = viewX[i];
		const y = viewY[i];
		const ex = pose.extentX + growM;
		const ey = pose.extentY + growM;
		const n = pose.n;
		// With the back to the sun up-sun is on the other side of the plane.
		const sign = pose.cosine < 0 ? -1 : 1;
		const cx = this.east[i] + pose.offset[0];
		const cy = this.north[i] + pose.offset[1];
		const cz = this.up[i] + pose.offset[2];
		this.nearCount = 0;
		const reachX = ex + this.widest;
		const reachY = ey + this.highest;
		const { lists } = this;
		let rows = 1;
		if (lists === null) {
			grid.box[0] = x;
			grid.box[1] = y;
			grid.box[2] = ex;
			grid.box[3] = ey;
			rows = grid.ask();
		}
		const order = lists === null ? grid.order : lists.items;
		for (let r = 0; r < rows; r++) {
			const row = lists === null ? 0 : i - lists.from;
			const end = lists === null ? grid.to[r] : lists.ends[row * TIERS + this.tier];
			for (let k = lists === null ? grid.from[r] : lists.starts[row]; k < end; k++) {
				const j = order[k];
				const dy = viewY[j] - y;
				if (dy >= reachY || -dy >= reachY) continue;
				const dx = viewX[j] - x;
				if (dx >= reachX || -dx >= reachX) continue;
				if (j === i) continue;
				const g = groupOf[j];
				const other = poses[g];
				if (other !== pose) {
					if (dx >= ex + other.extentX || -dx >= ex + other.extentX) continue;
					if (dy >= ey + other.extentY || -dy >= ey + other.extentY) continue;
				}
				const o = other.offset;
				const ahead =
					n[0] * (this.east[j] + o[0] - cx) +
					n[1] * (this.north[j] + o[1] - cy) +
					n[2] * (this.up[j] + o[2] - cz);
				const group = groups[g];
				const lean =
					other === pose
						? 0
						: group.steelHalfWidth * Math.abs(dot(n, other.u)) +
							group.steelHalfHeight * Math.abs(dot(n, other.v));
				if (sign * ahead + lean + growM <= UP_SUN_M) continue;
				if (this.nearCount === this.near.length) {
					const larger = new Int32Array(2 * this.near.length);
					larger.set(this.near);
					this.near = larger;
				}
				this.near[this.nearCount++] = j;
			}
		}
		this.nearSolidCount = 0;
		if (
			this.solids.length > 0 &&
			x - ex < this.solidsEast &&
			x + ex > this.solidsWest &&
			y - ey < this.solidsHigh &&
			y + ey > this.solidsLow
		) {
			const boxes = this.solidBoxes;
			for (let k = 0; k < this.solids.length; k++) {
				if (x + ex <= boxes[4 * k] || x - ex >= boxes[4 * k + 1]) continue;
				if (y + ey <= boxes[4 * k + 2] || y - ey >= boxes[4 * k + 3]) continue;
				this.nearSolids[this.nearSolidCount++] = k;
			}
		}
		return this.nearCount + this.nearSolidCount;
	}

	/** Tables that the last `collect` found. */
	collectedTables(): number[] {
		return Array.from(this.near.subarray(0, this.nearCount));
	}

	/** Solids that the last `collect` found and that pass less than a share of the light on the present day. */
	collectedSolids(passLessThan = Infinity): Solid[] {
		const found: Solid[] = [];
		for (let k = 0; k < this.nearSolidCount; k++) {
			const solid = this.nearSolids[k];
			if (this.solidPasses[solid] < passLessThan) found.push(this.solids[solid]);
		}
		return found;
	}

	/** Shaded share of table i, 0..1; 1 when its front is not lit. */
	share(i: number): number {
		if (this.cosine(i) <= LEAST_COSINE || this.hidden(i)) return 1;
		return this.collect(i) === 0 ? 0 : this.shareOfCollected(i);
	}

	/** Shaded shares of tables `from` to `to` (not itself) into `out` at their own places; how many are above 0. */
	shares(out: Float64Array, from = 0, to = this.count): number {
		let shaded = 0;
		if (this.alikeOnly && this.poses[0].cosine > LEAST_COSINE) {
			this.view.shares(this.poses[0].axes(), 0, out, from, to);
			for (let i = from; i < to; i++) if (out[i] > 0) shaded++;
			return shaded;
		}
		for (let i = from; i < to; i++) {
			out[i] = this.share(i);
			if (out[i] > 0) shaded++;
		}
		return shaded;
	}

	/** Whether near ground hides the light from table i. */
	hidden(i: number): boolean {
		return this.horizons !== null && this.horizons.hides(i, this.lightAzimuthDeg, this.lightElevationDeg);
	}

	/**
	 * Shaded share of table i, from what `collect` found for it, if one thing were not there: table `without`, or the
	 * obstacle -1 - source.
	 */
	shareWithout(i: number, without: number): number {
		const { near, nearCount, nearSolids, nearSolidCount } = this;
		const tables = near.slice(0, nearCount);
		const solids = nearSolids.slice(0, nearSolidCount);
		this.nearCount = 0;
		for (const j of tables) if (j !== without) near[this.nearCount++] = j;
		this.nearSolidCount = 0;
		for (const k of solids) if (-1 - this.solids[k].source !== without) nearSolids[this.nearSolidCount++] = k;
		const share = this.shareOfCollected(i);
		near.set(tables);
		nearSolids.set(solids);
		this.nearCount = nearCount;
		this.nearSolidCount = nearSolidCount;
		return share;
	}

	/** Shaded share from what `collect` found for the same table. */
	shareOfCollected(i: number): number {
		const g = this.groupOf[i];
		const pose = this.poses[g];
		if (pose.cosine <= LEAST_COSINE || this.hidden(i)) return 1;
		if (this.nearCount + this.nearSolidCount === 0) return 0;
		const group = this.groups[g];
		const area = 4 * (group.halfWidth - group.halfGap) * group.halfHeight;
		if (!(area > 0)) return 0;
		let alike = this.nearSolidCount === 0;
		for (let k = 0; alike && k < this.nearCount; k++) {
			const other = this.poses[this.groupOf[this.near[k]]];
			alike = other.azimuthDeg === pose.azimuthDeg && other.tiltDeg === pose.tiltDeg;
		}
		if (alike) return Math.min(1, this.alikeArea(i) / area);
		if (this.nearAreOpaque()) return Math.min(1, Math.max(0, this.opaqueArea(i) / area));
		this.cutPieces(i);
		return Math.min(1, Math.max(0, 1 - this.pieces.litArea() / area));
	}

	/** Flat polygons of the lit pieces of table i in table coordinates, metres. */
	litPolygons(i: number, leastLight: number): number[][] {
		if (this.cosine(i) <= LEAST_COSINE || this.hidden(i)) return [];
		this.collect(i);
		this.cutPieces(i);
		return this.pieces.polygons(leastLight);
	}

	/** Shadows of tables in the target's own pose are rectangles along its axes. */
	private alikeArea(i: number): number {
		const { rects, groupOf, groups, poses } = this;
		const pose = poses[groupOf[i]];
		const target = groups[groupOf[i]];
		let area = 0;
		const parts = target.halfGap > 0 ? 2 : 1;
		const h = target.halfHeight;
		for (let part = 0; part < parts; part++) {
			const x0 = parts === 2 && part === 1 ? target.halfGap : -target.halfWidth;
			const x1 = parts === 2 && part === 0 ? -target.halfGap : target.halfWidth;
			rects.clear();
			for (let k = 0; k < this.nearCount; k++) {
				const j = this.near[k];
				const other = poses[groupOf[j]];
				const shader = groups[groupOf[j]];
				const dx = this.east[j] + other.offset[0] - this.east[i] - pose.offset[0];
				const dy = this.north[j] + other.offset[1] - this.north[i] - pose.offset[1];
				const dz = this.up[j] + other.offset[2] - this.up[i] - pose.offset[2];
				const sx = pose.ux * dx + pose.uy * dy + pose.uz * dz;
				const sy = pose.vx * dx + pose.vy * dy + pose.vz * dz;
				const y0 = Math.max(-h, sy - shader.steelHalfHeight);
				const y1 = Math.min(h, sy + shader.steelHalfHeight);
				const w = shader.steelHalfWidth;
				if (shader.halfGap > 0) {
					rects.add(Math.max(x0, sx - w), Math.min(x1, sx - shader.halfGap), y0, y1);
					rects.add(Math.max(x0, sx + shader.halfGap), Math.min(x1, sx + w), y0, y1);
				} else {
					rects.add(Math.max(x0, sx - w), Math.min(x1, sx + w), y0, y1);
				}
			}
			area += rects.area();
		}
		return area;
	}

	/** Area shaded on a whole table by opaque things, m². */
	private opaqueArea(i: number): number {
		const { union, groupOf, groups, poses, corners, pair } = this;
		const pose = poses[groupOf[i]];
		const { halfWidth: w, halfHeight: h, halfGap } = groups[groupOf[i]];
		const { next } = union;
		union.begin(w, h);
		// The table's own slot comes in as one more shadow and is taken off again.
		if (halfGap > 0) {
			next[0] = -halfGap;
			next[1] = halfGap;
			next[2] = -h;
			next[3] = h;
			union.addRect();
		}
		for (let pass = 0; pass < 2; pass++) {
			const aligned = pass === 0;
			for (let k = 0; k < this.nearCount; k++) {
				const j = this.near[k];
				const other = poses[groupOf[j]];
				const same = other.azimuthDeg === pose.azimuthDeg && other.tiltDeg === pose.tiltDeg;
				if (same !== aligned) continue;
				const shader = groups[groupOf[j]];
				this.pairUp(i, j, pose, other, shader);
				const cx = pair[0];
				const cy = pair[1];
				const cd = pair[2];
				const uX = pair[3];
				const uY = pair[4];
				const uD = pair[5];
				const vX = pair[6];
				const vY = pair[7];
				const vD = pair[8];
				const ex = Math.abs(uX) + Math.abs(vX);
				const ey = Math.abs(uY) + Math.abs(vY);
				if (cx - ex >= w || cx + ex <= -w || cy - ey >= h || cy + ey <= -h) continue;
				const lean = Math.abs(uD) + Math.abs(vD);
				if (cd + lean <= UP_SUN_M) continue;
				const parts = shader.halfGap > 0 ? 2 : 1;
				const slot = shader.halfGap / shader.steelHalfWidth;
				for (let part = 0; part < parts; part++) {
					const a = parts === 2 && part === 1 ? slot : -1;
					const b = parts === 2 && part === 0 ? -slot : 1;
					if (same) {
						next[0] = cx + a * uX;
						next[1] = cx + b * uX;
						next[2] = cy - vY;
						next[3] = cy + vY;
						union.addRect();
					} else if (cd - lean > UP_SUN_M) {
						next[0] = cx + a * uX - vX;
						next[1] = cy + a * uY - vY;
						next[2] = cx + b * uX - vX;
						next[3] = cy + b * uY - vY;
						next[4] = cx + b * uX + vX;
						next[5] = cy + b * uY + vY;
						next[6] = cx + a * uX + vX;
						next[7] = cy + a * uY + vY;
						union.add(4);
					} else {
						for (let c = 0; c < 4; c++) {
							const along = c === 0 || c === 3 ? a : b;
							const up = c < 2 ? -1 : 1;
							corners[3 * c] = cx + along * uX + up * vX;
							corners[3 * c + 1] = cy + along * uY + up * vY;
							corners[3 * c + 2] = cd + along * uD + up * vD;
						}
						const m = this.clipUpSun(4);
						for (let c = 0; c < 2 * m; c++) next[c] = this.shadow[c];
						if (m > 0) union.add(m);
					}
				}
			}
			if (aligned) union.endRects();
		}
		for (let k = 0; k < this.nearSolidCount; k++) {
			const m = this.solidShadow(i, this.nearSolids[k], 0);
			for (let c = 0; c < 2 * m; c++) next[c] = this.shadow[c];
			if (m > 0) union.add(m);
		}
		return union.area() - 4 * halfGap * h;
	}

	/**
	 * Where the middle of table j falls on the plane of table i along the light and how far up-sun it stands, then the
	 * same of its half sides: into `pair`.
	 */
	private pairUp(i: number, j: number, pose: GroupPose, other: GroupPose, shader: TableGroup): void {
		const { pair } = this;
		const { n, cosine, ux, uy, uz, vx, vy, vz } = pose;
		const dx = this.east[j] + other.offset[0] - this.east[i] - pose.offset[0];
		const dy = this.north[j] + other.offset[1] - this.north[i] - pose.offset[1];
		const dz = this.up[j] + other.offset[2] - this.up[i] - pose.offset[2];
		pair[0] = ux * dx + uy * dy + uz * dz;
		pair[1] = vx * dx + vy * dy + vz * dz;
		pair[2] = (n[0] * dx + n[1] * dy + n[2] * dz) / cosine;
		const w = shader.steelHalfWidth;
		const h = shader.steelHalfHeight;
		const { u, v } = other;
		pair[3] = w * (ux * u[0] + uy * u[1] + uz * u[2]);
		pair[4] = w * (vx * u[0] + vy * u[1] + vz * u[2]);
		pair[5] = (w * (n[0] * u[0] + n[1] * u[1] + n[2] * u[2])) / cosine;
		pair[6] = h * (ux * v[0] + uy * v[1] + uz * v[2]);
		pair[7] = h * (vx * v[0] + vy * v[1] + vz * v[2]);
		pair[8] = (h * (n[0] * v[0] + n[1] * v[1] + n[2] * v[2])) / cosine;
	}

	private cutPieces(i: number): void {
		const { pieces, shadow } = this;
		const { halfWidth: w, halfHeight: h, halfGap } = this.groups[this.groupOf[i]];
		pieces.clear();
		if (halfGap > 0) {
			pieces.addRect(-w, -halfGap, -h, h);
			pieces.addRect(halfGap, w, -h, h);
		} else {
			pieces.addRect(-w, w, -h, h);
		}
		for (let k = 0; k < this.nearCount && pieces.count > 0; k++) {
			const parts = this.tableParts(this.near[k]);
			for (let part = 0; part < parts; part++) {
				const m = this.tableShadow(i, this.near[k], part, 0);
				if (m > 0) pieces.subtract(shadow, m, 0);
			}
		}
		for (let k = 0; k < this.nearSolidCount && pieces.count > 0; k++) {
			const m = this.solidShadow(i, this.nearSolids[k], 0);
			if (m > 0) pieces.subtract(shadow, m, this.solidPasses[this.nearSolids[k]]);
		}
	}

	private nearAreOpaque(): boolean {
		for (let k = 0; k < this.nearSolidCount; k++) if (this.solidPasses[this.nearSolids[k]] > 0) return false;
		return true;
	}

	private tableParts(j: number): number {
		return this.groups[this.groupOf[j]].halfGap > 0 ? 2 : 1;
	}

	/**
	 * Calls back with every shadow of the things found by `collect` on the plane `forwardM` in front of table i:
	 * polygon in table coordinates, counter-clockwise, its corners, the share of light that passes, and the table
	 * (0..) or the obstacle (-1 - source) that throws it.
	 */
	shadowsAhead(
		i: number,
		forwardM: number,
		visit: (shadow: Float64Array, corners: number, passes: number, by: number) => void
	): void {
		for (let k = 0; k < this.nearCount; k++) {
			const parts = this.tableParts(this.near[k]);
			for (let part = 0; part < parts; part++) {
				const m = this.tableShadow(i, this.near[k], part, forwardM);
				if (m > 0) visit(this.shadow, m, 0, this.near[k]);
			}
		}
		for (let k = 0; k < this.nearSolidCount; k++) {
			const solid = this.solids[this.nearSolids[k]];
			const m = this.solidShadow(i, this.nearSolids[k], forwardM);
			if (m > 0) visit(this.shadow, m, this.solidPasses[this.nearSolids[k]], -1 - solid.source);
		}
	}

	/** Shadow of half `part` of table j on the plane `forwardM` ahead of table i, into `shadow`; its corners or 0. */
	private tableShadow(i: number, j: number, part: number, forwardM: number): number {
		const { groupOf, groups, poses, corners } = this;
		const pose = poses[groupOf[i]];
		const other = poses[groupOf[j]];
		const shader = groups[groupOf[j]];
		const { n, cosine } = pose;
		const dx = this.east[j] + other.offset[0] - this.east[i] - pose.offset[0] - forwardM * n[0];
		const dy = this.north[j] + other.offset[1] - this.north[i] - pose.offset[1] - forwardM * n[1];
		const dz = this.up[j] + other.offset[2] - this.up[i] - pose.offset[2] - forwardM * n[2];
		const w = shader.steelHalfWidth;
		const h = shader.steelHalfHeight;
		const x0 = shader.halfGap > 0 && part === 1 ? shader.halfGap : -w;
		const x1 = shader.halfGap > 0 && part === 0 ? -shader.halfGap : w;
		const cx = pose.ux * dx + pose.uy * dy + pose.uz * dz;
		const cy = pose.vx * dx + pose.vy * dy + pose.vz * dz;
		const cd = (n[0] * dx + n[1] * dy + n[2] * dz) / cosine;
		const { u, v } = other;
		const uX = pose.ux * u[0] + pose.uy * u[1] + pose.uz * u[2];
		const uY = pose.vx * u[0] + pose.vy * u[1] + pose.vz * u[2];
		const uD = dot(n, u) / cosine;
		const vX = pose.ux * v[0] + pose.uy * v[1] + pose.uz * v[2];
		const vY = pose.vx * v[0] + pose.vy * v[1] + pose.vz * v[2];
		const vD = dot(n, v) / cosine;
		for (let k = 0; k < 4; k++) {
			const a = k === 0 || k === 3 ? x0 : x1;
			const b = k < 2 ? -h : h;
			corners[3 * k] = cx + a * uX + b * vX;
			corners[3 * k + 1] = cy + a * uY + b * vY;
			corners[3 * k + 2] = cd + a * uD + b * vD;
		}
		return this.clipUpSun(4);
	}

	/** Keeps the part of the flat-ordered `corners` (x, y, distance up-sun) that stands up-sun; counter-clockwise. */
	private clipUpSun(m: number): number {
		const { corners, shadow } = this;
		let size = 0;
		for (let k = 0; k < m; k++) {
			const o = 3 * k;
			const q = k + 1 === m ? 0 : o + 3;
			const d = corners[o + 2] - UP_SUN_M;
			const e = corners[q + 2] - UP_SUN_M;
			if (d > 0) {
				shadow[2 * size] = corners[o];
				shadow[2 * size++ + 1] = corners[o + 1];
			}
			if (d > 0 !== e > 0) {
				const t = d / (d - e);
				shadow[2 * size] = corners[o] + (corners[q] - corners[o]) * t;
				shadow[2 * size++ + 1] = corners[o + 1] + (corners[q + 1] - corners[o + 1]) * t;
			}
		}
		if (size < 3) return 0;
		const area = flatArea(shadow, 0, size);
		if (Math.abs(area) < LEAST_SHADOW_M2) return 0;
		if (area < 0) this.reverse(size);
		return size;
	}

	private reverse(m: number): void {
		const { shadow } = this;
		for (let a = 0, b = m - 1; a < b; a++, b--) {
			for (let c = 0; c < 2; c++) {
				const keep = shadow[2 * a + c];
				shadow[2 * a + c] = shadow[2 * b + c];
				shadow[2 * b + c] = keep;
			}
		}
	}

	/** Shadow of solid k on the plane ahead of table i, into `shadow`; its corners or 0. */
	private solidShadow(i: number, k: number, forwardM: number): number {
		const { solids, corners, shadow } = this;
		const pose = this.poses[this.groupOf[i]];
		const { vertices, edges } = solids[k];
		const { n, cosine } = pose;
		const cx = this.east[i] + pose.offset[0] + forwardM * n[0];
		const cy = this.north[i] + pose.offset[1] + forwardM * n[1];
		const cz = this.up[i] + pose.offset[2] + forwardM * n[2];
		const count = vertices.length / 3;
		let ahead = 0;
		for (let o = 0; o < vertices.length; o += 3) {
			const dx = vertices[o] - cx;
			const dy = vertices[o + 1] - cy;
			const dz = vertices[o + 2] - cz;
			corners[o] = pose.ux * dx + pose.uy * dy + pose.uz * dz;
			corners[o + 1] = pose.vx * dx + pose.vy * dy + pose.vz * dz;
			const d = (n[0] * dx + n[1] * dy + n[2] * dz) / cosine;
			corners[o + 2] = d;
			if (d > UP_SUN_M) ahead++;
		}
		if (ahead === 0) return 0;
		if (ahead === count) {
			// Its outline in the sun's view is the same whichever table it falls on.
			const outline = this.outlineOf(k);
			for (let c = 0; c < outline.length; c++) {
				shadow[2 * c] = corners[3 * outline[c]];
				shadow[2 * c + 1] = corners[3 * outline[c] + 1];
			}
			const area = flatArea(shadow, 0, outline.length);
			if (Math.abs(area) < LEAST_SHADOW_M2) return 0;
			if (area < 0) this.reverse(outline.length);
			return outline.length;
		}
		const { hullX, hullY, hullIndex } = this;
		let size = 0;
		for (let o = 0; o < 3 * count; o += 3) {
			if (corners[o + 2] <= UP_SUN_M) continue;
			hullX[size] = corners[o];
			hullY[size++] = corners[o + 1];
		}
		for (let e = 0; e < edges.length; e += 2) {
			const p = 3 * edges[e];
			const q = 3 * edges[e + 1];
			const d = corners[p + 2] - UP_SUN_M;
			const f = corners[q + 2] - UP_SUN_M;
			if (d > 0 === f > 0) continue;
			const t = d / (d - f);
			hullX[size] = corners[p] + (corners[q] - corners[p]) * t;
			hullY[size++] = corners[p + 1] + (corners[q + 1] - corners[p + 1]) * t;
		}
		const m = hullOrder(hullX, hullY, size, hullIndex);
		for (let c = 0; c < m; c++) {
			shadow[2 * c] = hullX[hullIndex[c]];
			shadow[2 * c + 1] = hullY[hullIndex[c]];
		}
		return m < 3 || flatArea(shadow, 0, m) < LEAST_SHADOW_M2 ? 0 : m;
	}

	private outlineOf(k: number): Int32Array {
		const known = this.outlines[k];
		if (known) return known;
		const { axisX: ax, axisY: ay, hullX, hullY, hullIndex } = this;
		const { vertices } = this.solids[k];
		for (let o = 0, c = 0; o < vertices.length; o += 3, c++) {
			hullX[c] = vertices[o] * ax[0] + vertices[o + 1] * ax[1];
			hullY[c] = vertices[o] * ay[0] + vertices[o + 1] * ay[1] + vertices[o + 2] * ay[2];
		}
		const outline = hullIndex.slice(0, hullOrder(hullX, hullY, vertices.length / 3, hullIndex));
		this.outlines[k] = outline;
		return outline;
	}
}

function dot(a: readonly number[], b: readonly number[]): number {
	return a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
}
