/**
 * The heading over what needs attention.
 * @example summaryHeading(2) // '2 entries need another look'
 */
export function summaryHeading(count: number): string {
	return count === 1 ? '1 entry needs another look' : `${String(count)} entries need another look`;
}
