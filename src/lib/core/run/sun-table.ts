/**
 * The suns of a run, sorted for many tables: by sector of azimuth, and in a sector from the highest sun down. Who can
 * shade whom is found once a sector, and each table stops at the first sun that nothing reaches.
 */
export interface SunTable {
	readonly count: number;
	readonly azimuthDeg: Float64Array;
	/** Apparent. */
	readonly elevationDeg: Float64Array;
	/** Of the elevation. */
	readonly sine: Float64Array;
	/** Beam square to the sun over the step, kWh/m² (or whatever the sums are to be weighted by). */
	readonly weight: Float64Array;
	/** Where the step's sums go. */
	readonly bin: Int32Array;
	/** 1..366, for what stands in leaf. */
	readonly day: Int16Array;
	/** Place of the sun in the list that the table was made from. */
	readonly source: Int32Array;
	/** First sun of each sector, and the end. */
	readonly sectorStart: Int32Array;
}

/** One sun of a run. */
export interface TableSun {
	azimuthDeg: number;
	elevationDeg: number;
	weight: number;
	bin: number;
	day: number;
}

/** Sectors of azimuth round the sky. */
export const SUN_SECTORS = 144;
export const SECTOR_DEG = 360 / SUN_SECTORS;

/** Sector of an azimuth 0..360. */
export const sectorOf = (azimuthDeg: number): number =>
	Math.min(SUN_SECTORS - 1, Math.max(0, Math.floor(azimuthDeg / SECTOR_DEG)));

/** Sorts the suns of a run; all must stand above the horizon. */
export function sunTable(suns: readonly TableSun[]): SunTable {
	const count = suns.length;
	const sector = Int32Array.from(suns, (sun) => sectorOf(sun.azimuthDeg));
	const sectorStart = new Int32Array(SUN_SECTORS + 1);
	for (const s of sector) sectorStart[s + 1]++;
	for (let s = 0; s < SUN_SECTORS; s++) sectorStart[s + 1] += sectorStart[s];
	const next = sectorStart.slice();
	const order = new Int32Array(count);
	for (let k = 0; k < count; k++) order[next[sector[k]]++] = k;
	for (let s = 0; s < SUN_SECTORS; s++) {
		order
			.subarray(sectorStart[s], sectorStart[s + 1])
			.sort((a, b) => suns[b].elevationDeg - suns[a].elevationDeg || a - b);
	}
	const elevationDeg = Float64Array.from(order, (k) => suns[k].elevationDeg);
	return {
		count,
		azimuthDeg: Float64Array.from(order, (k) => suns[k].azimuthDeg),
		elevationDeg,
		sine: elevationDeg.map((e) => Math.sin((e * Math.PI) / 180)),
		weight: Float64Array.from(order, (k) => suns[k].weight),
		bin: Int32Array.from(order, (k) => suns[k].bin),
		day: Int16Array.from(order, (k) => suns[k].day),
		source: order,
		sectorStart
	};
}
