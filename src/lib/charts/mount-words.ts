import type { Mount, MountEdge } from '$lib/core/document';
import type { MountClass } from '$lib/core/results';
import { formatNumber } from '$lib/i18n';

export const mountEdges: readonly MountEdge[] = ['top', 'right', 'bottom', 'left'];

export const edgeWords: Record<MountEdge, string> = {
	top: 'top edge',
	right: 'right side',
	bottom: 'bottom edge',
	left: 'left side'
};

/** Best first. */
export const mountClasses: readonly MountClass[] = ['clear', 'sound', 'watch', 'unfit'];

export const classWords: Record<MountClass, string> = {
	clear: 'Clear',
	sound: 'Sound',
	watch: 'Watch',
	unfit: 'Unfit'
};

/** What each class means for the work. */
export const classMeanings: Record<MountClass, string> = {
	clear: 'hardly ever shaded',
	sound: 'shaded now and then, without harm',
	watch: 'shaded often enough to look after',
	unfit: 'shaded too much: not here'
};

/** Sound lies between clear and watch and has no token of its own: 3:1 at least against the sheet in both themes. */
export const classColours: Record<MountClass, string> = {
	clear: 'var(--color-clear)',
	sound: 'light-dark(#7d8f2b, #b9c95a)',
	watch: 'var(--color-sun)',
	unfit: 'var(--color-blind)'
};

/** "0.60 m right of the middle", seen facing the glass. */
export function alongWords(mount: Mount): string {
	const tenths = Math.round(Math.abs(mount.alongM) * 100) / 100;
	if (tenths < 0.005) return 'in the middle';
	const level = mount.edge === 'top' || mount.edge === 'bottom';
	const way = level ? (mount.alongM > 0 ? 'right of' : 'left of') : mount.alongM > 0 ? 'above' : 'below';
	return `${formatNumber(tenths, 2)} m ${way} the middle`;
}

/** "8 cm above the glass", "8 cm beyond the glass". */
export function outWords(mount: Mount): string {
	const centimetres = Math.round(mount.outM * 100);
	if (centimetres === 0) return 'flush with the glass edge';
	if (centimetres < 0) return `${-centimetres} cm inside the glass edge`;
	const way = mount.edge === 'top' ? 'above' : mount.edge === 'bottom' ? 'below' : 'outside';
	return `${centimetres} cm ${way} the glass edge`;
}

/** The whole place: "Top edge, 0.60 m right of the middle, 8 cm above the glass edge, 3 cm in front". */
export function mountWords(mount: Mount): string {
	const edge = edgeWords[mount.edge];
	const front = Math.round(mount.forwardM * 100);
	const forward =
		front === 0 ? 'level with the glass' : `${Math.abs(front)} cm ${front > 0 ? 'in front' : 'behind'}`;
	return `${edge[0].toUpperCase()}${edge.slice(1)}, ${alongWords(mount)}, ${outWords(mount)}, ${forward}`;
}

/** The same place, to a millimetre. */
export function sameMount(a: Mount | null, b: Mount | null): boolean {
	if (a === null || b === null) return a === b;
	const near = (x: number, y: number) => Math.abs(x - y) < 0.001;
	return (
		a.edge === b.edge && near(a.alongM, b.alongM) && near(a.outM, b.outM) && near(a.forwardM, b.forwardM)
	);
}
