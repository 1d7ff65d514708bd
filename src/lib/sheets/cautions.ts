/** Cautions of the plan, in the order of who can be hurt soonest. */
export const planCautions: readonly { head: string; text: string }[] = [
	{
		head: 'Moves by itself',
		text: 'A tracker can start at any moment: at dawn, in wind, after a power cut. Isolate and lock it before anyone enters its reach circle (red).'
	},
	{
		head: 'Crushing',
		text: 'Keep out of the gaps between table and pole, table and ground, table and neighbour while power is on.'
	},
	{
		head: 'Structure and foundations',
		text: 'Bases, poles, wind load and wind stow settings are for a licensed engineer and the maker. This plan does not size them.'
	},
	{
		head: 'Buried services',
		text: 'This plan does not show what lies in the ground. Get drawings, trace, get the permit, dig by hand near a find.'
	},
	{
		head: 'Overhead lines',
		text: 'Agree crane, pole and table handling distances with the line’s owner before lifting.'
	},
	{
		head: 'Electrical work',
		text: 'Modules are live in daylight. Design and work by licensed people to the local code; test before touch.'
	},
	{
		head: 'Eyes',
		text: 'Never look at the sun to check aim; use the shadow of a pin. Tables can mirror the sun.'
	},
	{
		head: 'Limits of the study',
		text: 'Shade was computed for the obstacles, ground and machines stated, on their date. Steel turns a compass: no end stop is set by one.'
	}
];

/** Cautions that belong to fitting the sensor. */
export const mountCautions: readonly string[] = [
	'Isolate and lock the tracker before climbing or reaching over the table.',
	'Work at height: use the service posture and a platform, not the modules.',
	'Glass is live and hot in sun: keep connectors closed, wear gloves.',
	'Never look along the sensor into the sun; check aim by the shadow of a pin.'
];
