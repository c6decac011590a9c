/**
 * Places in order, moved so that each stands at least `gap` below the one before and the last no
 * further than `end`: for labels beside the ends of curves.
 *
 * @param wanted - ascending
 * @example placeApart([10, 12, 60], 10, 100) // [10, 20, 60]
 */
export function placeApart(wanted: readonly number[], gap: number, end: number): number[] {
	const down: number[] = [];
	for (const place of wanted) down.push(Math.max(place, (down.at(-1) ?? -Infinity) + gap));
	const up: number[] = [];
	for (const place of down.toReversed()) up.push(Math.min(place, (up.at(-1) ?? end + gap) - gap));
	return up.toReversed();
}
