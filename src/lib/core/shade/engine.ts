import { AlikeView } from './alike-view';
import { LightView } from './light-view';
import { LitPieces } from './pieces';
import { TIERS, type SectorLists } from './sector-lists';
import { ShadowBuffer } from './shadow-buffer';
import { ShadowUnion } from './shadow-union';
import type { Solid } from './solid';
import { SolidView } from './solid-view';
import { dot, LEAST_COSINE, UP_SUN_M, type TableGroup, type TableHorizons } from './table-group';
import { TableShadows } from './table-shadows';
import { ViewGrid } from './view-grid';

/**
 * Exact shade of a set of tables and solids under one light at a time.
 *
 * Who can shade whom is found in the light's view: each table's outline box goes into a flat grid and only boxes that
 * overlap are looked at. This needs memory in proportion to the number of tables and is safe when stops clamp a pose.
 * Opaque shadows are united (those of tables in the target's own pose are rectangles along its sides); under crowns, and
 * for drawing, shadows are subtracted from the target's lit pieces.
 */
export class ShadeEngine extends LightView {
	/** Bodies that throw shade, opaque ones first. */
	readonly solids: readonly Solid[];
	private readonly buffer = new ShadowBuffer();
	private readonly bodies: SolidView;
	private readonly shadows: TableShadows;
	private readonly grid = new ViewGrid();
	private readonly union = new ShadowUnion();
	private readonly pieces = new LitPieces();
	/** All tables are of one kind and nothing else throws shade: the quick way for the whole field. */
	private readonly allAlike: boolean;
	private readonly alike: AlikeView;
	/** Neighbours by sector of azimuth, while a run goes through one. */
	private lists: SectorLists | null = null;
	private tier = 0;
	/** Tables that the last `collect` found. */
	private near = new Int32Array(64);
	private nearCount = 0;

	constructor(
		/** Fixed points of the tables, metres. */
		east: Float64Array,
		north: Float64Array,
		up: Float64Array,
		/** Group of each table. */
		groupOf: Int32Array,
		groups: readonly TableGroup[],
		solids: readonly Solid[],
		/** Near ground that hides the light from single tables; null where there is none. */
		readonly horizons: TableHorizons | null = null
	) {
		super(east, north, up, groupOf, groups);
		this.bodies = new SolidView(solids, this.buffer);
		this.solids = this.bodies.solids;
		this.shadows = new TableShadows(this, this.buffer);
		this.allAlike =
			groups.length === 1 && groups[0].halfGap === 0 && solids.length === 0 && horizons === null;
		this.alike = new AlikeView(this, groups[0]);
	}

	/** Turns to a day of the year, 1..366: trees stand in leaf or bare. Bare until it is called. */
	setDay(dayOfYear: number): void {
		this.bodies.setDay(dayOfYear);
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
		this.turn(azimuthDeg, elevationDeg, lightAzimuthDeg, lightElevationDeg);
		this.bodies.turn(this.axisX, this.axisY);
		const { grid, viewX, viewY, count } = this;
		if (indexed) grid.build(viewX, viewY, count, 2 * this.widest, 2 * this.highest);
		else if (indexed === false) grid.leave(viewX, viewY, count);
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
		return this.nearCount + this.bodies.collect(x, y, ex, ey);
	}

	/** Tables that the last `collect` found. */
	collectedTables(): number[] {
		return Array.from(this.near.subarray(0, this.nearCount));
	}

	/** Solids that the last `collect` found and that pass less than a share of the light on the present day. */
	collectedSolids(passLessThan = Infinity): Solid[] {
		const found: Solid[] = [];
		for (let k = 0; k < this.bodies.nearCount; k++) {
			const solid = this.bodies.near[k];
			if (this.bodies.passes[solid] < passLessThan) found.push(this.solids[solid]);
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
		if (this.allAlike && this.poses[0].cosine > LEAST_COSINE) {
			this.alike.shares(this.poses[0].axes(), 0, out, from, to);
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
		const { near, nearCount, bodies } = this;
		const tables = near.slice(0, nearCount);
		const solids = bodies.near.slice(0, bodies.nearCount);
		this.nearCount = 0;
		for (const j of tables) if (j !== without) near[this.nearCount++] = j;
		bodies.nearCount = 0;
		for (const k of solids) if (-1 - this.solids[k].source !== without) bodies.near[bodies.nearCount++] = k;
		const share = this.shareOfCollected(i);
		near.set(tables);
		bodies.near.set(solids);
		this.nearCount = nearCount;
		bodies.nearCount = solids.length;
		return share;
	}

	/** Shaded share from what `collect` found for the same table. */
	shareOfCollected(i: number): number {
		const g = this.groupOf[i];
		const pose = this.poses[g];
		if (pose.cosine <= LEAST_COSINE || this.hidden(i)) return 1;
		if (this.nearCount + this.bodies.nearCount === 0) return 0;
		const group = this.groups[g];
		const area = 4 * (group.halfWidth - group.halfGap) * group.halfHeight;
		if (!(area > 0)) return 0;
		if (this.bodies.nearAreOpaque) return Math.min(1, Math.max(0, this.opaqueArea(i) / area));
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

	/** Area shaded on a table by opaque things, m². */
	private opaqueArea(i: number): number {
		const { union, shadows, bodies, near, buffer } = this;
		const { halfWidth: w, halfHeight: h, halfGap } = this.groups[this.groupOf[i]];
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
		let others = 0;
		for (let k = 0; k < this.nearCount; k++) {
			if (shadows.aligned(i, near[k])) shadows.addTo(union, i, near[k], true);
			else others++;
		}
		union.endRects();
		for (let k = 0; k < this.nearCount && others > 0; k++) {
			if (!shadows.aligned(i, near[k])) shadows.addTo(union, i, near[k], false);
		}
		for (let k = 0; k < bodies.nearCount; k++) {
			const m = this.solidShadow(i, bodies.near[k], 0);
			for (let c = 0; c < 2 * m; c++) next[c] = buffer.shadow[c];
			if (m > 0) union.add(m);
		}
		return union.area() - 4 * halfGap * h;
	}

	/** Cuts the lit pieces of a table. */
	private cutPieces(i: number): void {
		const { pieces, shadows, bodies, near, buffer } = this;
		const { halfWidth: w, halfHeight: h, halfGap } = this.groups[this.groupOf[i]];
		pieces.clear();
		if (halfGap > 0) {
			pieces.addRect(-w, -halfGap, -h, h);
			pieces.addRect(halfGap, w, -h, h);
		} else {
			pieces.addRect(-w, w, -h, h);
		}
		for (let k = 0; k < this.nearCount && pieces.count > 0; k++) {
			const parts = shadows.parts(near[k]);
			for (let part = 0; part < parts; part++) {
				const m = shadows.shadow(i, near[k], part, 0);
				if (m > 0) pieces.subtract(buffer.shadow, m, 0);
			}
		}
		for (let k = 0; k < bodies.nearCount && pieces.count > 0; k++) {
			const m = this.solidShadow(i, bodies.near[k], 0);
			if (m > 0) pieces.subtract(buffer.shadow, m, bodies.passes[bodies.near[k]]);
		}
	}

	/** Shadow of solid k on the plane `forwardM` ahead of table i, into the buffer; its corners or 0. */
	private solidShadow(i: number, k: number, forwardM: number): number {
		const pose = this.poses[this.groupOf[i]];
		const { n, offset } = pose;
		return this.bodies.shadow(
			k,
			pose,
			this.east[i] + offset[0] + forwardM * n[0],
			this.north[i] + offset[1] + forwardM * n[1],
			this.up[i] + offset[2] + forwardM * n[2]
		);
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
		const { shadows, bodies, buffer, near } = this;
		for (let k = 0; k < this.nearCount; k++) {
			const parts = shadows.parts(near[k]);
			for (let part = 0; part < parts; part++) {
				const m = shadows.shadow(i, near[k], part, forwardM);
				if (m > 0) visit(buffer.shadow, m, 0, near[k]);
			}
		}
		for (let k = 0; k < bodies.nearCount; k++) {
			const solid = bodies.near[k];
			const m = this.solidShadow(i, solid, forwardM);
			if (m > 0) visit(buffer.shadow, m, bodies.passes[solid], -1 - this.solids[solid].source);
		}
	}
}
