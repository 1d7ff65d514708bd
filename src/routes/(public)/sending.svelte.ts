import type { SubmitFunction } from '@sveltejs/kit';

/** A form on its way: `busy` from pressing the button to the answer. What was typed stays when it is refused. */
export function sending() {
	let busy = $state(false);
	const submit: SubmitFunction = () => {
		busy = true;
		return async ({ update, result }) => {
			await update({ reset: result.type === 'success' });
			busy = false;
		};
	};
	return {
		get busy() {
			return busy;
		},
		submit
	};
}
