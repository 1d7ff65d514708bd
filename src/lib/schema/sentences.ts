/** What a refused field says when its shape gives no sentence of its own: what to give, not what was expected of what. */
import { z } from 'zod';

const wanted: Record<string, string> = {
	string: 'text',
	number: 'a number',
	int: 'a whole number',
	boolean: 'true or false',
	array: 'a list',
	tuple: 'a list',
	object: 'an object with its fields',
	record: 'an object with its fields'
};

const others = z.locales.en().localeError;

z.config({
	localeError: (issue) => {
		const what = issue.code === 'invalid_type' ? wanted[issue.expected] : undefined;
		if (!what) return others(issue);
		return issue.input === undefined ? `This is missing: give ${what}.` : `Give ${what}.`;
	}
});
