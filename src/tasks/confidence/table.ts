import { LOT_SHARES } from './design';
import { judge } from './judge';
import { PROMISE, type Cell } from './study';

const percent = (share: number) => (100 * share).toFixed(1);

/** Falls short by more than is allowed: set in italics where it is a known limitation. */
function cellText(cell: Cell): string {
	const text = percent(cell.confidence);
	switch (judge(cell).status) {
		case 'holds':
			return text;
		case 'limited':
			return `_${text}_`;
		case 'falls short':
			return `**${text}**`;
	}
}

const rowKey = ({ method, promise, shape }: Cell) => [method, promise, shape].join(' · ');

/**
 * The cells as a Markdown table: a row a method, promise and design, a column a number of lots, and
 * in it the confidence in per cent for each share of variance between lots.
 */
export function confidenceTable(cells: readonly Cell[]): string {
	const counts = [...new Set(cells.map(({ lotSizes }) => lotSizes.length))].sort((a, b) => a - b);
	const rows = [...new Set(cells.map(rowKey))];
	const heads = ['limit', ...counts.map((count) => `${count} lots`)];
	const lines = rows.map((row) => {
		const ofRow = cells.filter((cell) => rowKey(cell) === row);
		const columns = counts.map((count) =>
			LOT_SHARES.flatMap((share) =>
				ofRow.filter((cell) => cell.lotSizes.length === count && cell.lotShare === share)
			)
				.map(cellText)
				.join(' ')
		);
		return [row, ...columns];
	});
	return [heads, heads.map(() => '---'), ...lines]
		.map((line) => `| ${line.join(' | ')} |`)
		.join('\n');
}

/** One line a cell, with its standard error. */
export function cellLine(cell: Cell): string {
	const verdict = judge(cell);
	const said = verdict.status === 'limited' ? `limitation: ${verdict.limitation}` : verdict.status;
	return [
		cell.method,
		cell.promise,
		`${cell.lotSizes.length} ${cell.shape}`,
		`lot share ${cell.lotShare}`,
		`${percent(cell.confidence)} % of ${percent(PROMISE.confidence)} %`,
		`± ${(100 * cell.standardError).toFixed(2)} % (${cell.simulations})`,
		said
	].join(' | ');
}
