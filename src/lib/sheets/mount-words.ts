import type { Mount, TrackerModel } from '../core';

/** A place on the frame as a crew measures it: from the glass edges of one table, seen facing the glass. */
export interface MountDimensions {
	edge: Mount['edge'];
	/** From the top glass edge down to the head's centre, metres; negative is above the glass. */
	fromTopM: number;
	/** The named side that the crew measures from: the nearer one. */
	side: 'left' | 'right';
	/** From that side's glass edge to the head's centre, metres; negative is outside the glass. */
	fromSideM: number;
	/** Outward of its edge, metres. */
	outM: number;
	/** In front of the glass, metres. */
	forwardM: number;
	/** Head's centre from the table's centre: to the right and up, metres. */
	rightM: number;
	upM: number;
}

/** The measures of a mount on a model's table. Right and left as seen by someone facing the glass. */
export function mountDimensions(mount: Mount, model: TrackerModel): MountDimensions {
	const halfW = model.widthM / 2;
	const halfH = model.heightM / 2;
	const level = mount.edge === 'top' || mount.edge === 'bottom';
	const rightM = level ? mount.alongM : (mount.edge === 'right' ? 1 : -1) * (halfW + mount.outM);
	const upM = level ? (mount.edge === 'top' ? 1 : -1) * (halfH + mount.outM) : mount.alongM;
	const side = rightM > 0 ? 'right' : 'left';
	return {
		edge: mount.edge,
		fromTopM: halfH - upM,
		side,
		fromSideM: side === 'left' ? rightM + halfW : halfW - rightM,
		outM: mount.outM,
		forwardM: mount.forwardM,
		rightM,
		upM
	};
}

/** Whole millimetres with a true minus sign. */
export function millimetres(valueM: number): string {
	const whole = Math.round(valueM * 1000) + 0;
	return whole < 0 ? `−${-whole}` : `${whole}`;
}

/** `top edge, 3600 from left side, 80 above the top edge, 30 ahead of the glass (mm)`. */
export function mountInWords(mount: Mount, model: TrackerModel): string {
	const d = mountDimensions(mount, model);
	const level = mount.edge === 'top' || mount.edge === 'bottom';
	const along = level
		? `${millimetres(d.fromSideM)} from the ${d.side} side`
		: `${millimetres(d.fromTopM)} from the top edge`;
	const out = `${millimetres(Math.abs(d.outM))} ${d.outM < 0 ? 'inside' : 'beyond'} the edge`;
	const forward = `${millimetres(Math.abs(d.forwardM))} ${d.forwardM < 0 ? 'behind' : 'ahead of'} the glass`;
	return `${mount.edge} edge, ${along}, ${out}, ${forward} (mm)`;
}

/** `top edge, right side 2400, out 80, ahead 30`: for a narrow column. */
export function mountInShort(mount: Mount, model: TrackerModel): string {
	const d = mountDimensions(mount, model);
	const level = mount.edge === 'top' || mount.edge === 'bottom';
	const along = level ? `${d.side} side ${millimetres(d.fromSideM)}` : `below top ${millimetres(d.fromTopM)}`;
	return `${mount.edge} edge, ${along}, out ${millimetres(d.outM)}, ahead ${millimetres(d.forwardM)}`;
}
