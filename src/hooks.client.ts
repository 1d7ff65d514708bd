import type { HandleClientError } from '@sveltejs/kit';

/** A failure inside the page: said in words, with the details on the browser's console for whoever helps. */
export const handleError: HandleClientError = ({ error, status, message }) => {
	console.error(error);
	if (status === 404) return { message: 'There is nothing at this address, or it is not yours to see.' };
	return {
		message:
			status >= 500
				? 'The page stumbled. What was saved is safe. Reload the page and go on from there.'
				: message
	};
};
