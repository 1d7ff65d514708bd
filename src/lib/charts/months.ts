import { MONTH_NAMES } from '$lib/core';

/** Short names of the months, January first. */
export const monthNames = [
	'Jan',
	'Feb',
	'Mar',
	'Apr',
	'May',
	'Jun',
	'Jul',
	'Aug',
	'Sep',
	'Oct',
	'Nov',
	'Dec'
] as const;

/** Names of the months for sentences, January first. */
export const longMonthNames = MONTH_NAMES;
