/** Whether the database refused a row because a unique key has it already. drizzle wraps the driver's error. */
export function isDuplicate(error: unknown): boolean {
	for (let each = error; each instanceof Error; each = each.cause)
		if ('code' in each && each.code === 'ER_DUP_ENTRY') return true;
	return false;
}
