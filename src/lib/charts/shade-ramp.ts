/**
 * The colours of the shaded share, lit to shaded: lightness falls steadily, so that the order survives a grey print
 * and colour-blind eyes. The same everywhere: 3D view, strips, plan, PDF. `app.css` repeats the stops as variables.
 */
export interface ShadeStop {
	/** Shaded share, 0..1. */
	share: number;
	/** `#rrggbb` */
	colour: string;
}

export const shadeStops: readonly ShadeStop[] = [
	{ share: 0, colour: '#fff3cf' },
	{ share: 0.2, colour: '#f4cf83' },
	{ share: 0.4, colour: '#d79a63' },
	{ share: 0.6, colour: '#9a6a78' },
	{ share: 0.8, colour: '#5c4a86' },
	{ share: 1, colour: '#2a2250' }
];

/** The legend that goes with every use of the ramp: stop and its label in whole percent. */
export const shadeLegend: readonly (ShadeStop & { label: string })[] = shadeStops.map((stop) => ({
	...stop,
	label: `${Math.round(stop.share * 100)}\u00a0%`
}));

const stopChannels = shadeStops.map(({ colour }) => {
	const value = Number.parseInt(colour.slice(1), 16);
	return [(value >> 16) & 255, (value >> 8) & 255, value & 255] as const;
});

/** Red, green, blue (0..255, whole) of a shaded share; shares outside 0..1 are held to the ends, NaN reads as 0. */
export function shadeChannels(share: number): [number, number, number] {
	const held = share > 0 ? Math.min(share, 1) : 0;
	const position = held * (stopChannels.length - 1);
	const index = Math.min(Math.floor(position), stopChannels.length - 2);
	const part = position - index;
	const [from, to] = [stopChannels[index], stopChannels[index + 1]];
	const mix = (channel: 0 | 1 | 2) => Math.round(from[channel] + (to[channel] - from[channel]) * part);
	return [mix(0), mix(1), mix(2)];
}

/** `#rrggbb` of a shaded share 0..1, piecewise linear between the stops. */
export function shadeColour(share: number): string {
	const [red, green, blue] = shadeChannels(share);
	return `#${((red << 16) | (green << 8) | blue).toString(16).padStart(6, '0')}`;
}
