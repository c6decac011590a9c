import { execFileSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';

/** Runs a program of the machine on a file; a missing program fails the test. */
export function runOn(
	bytes: Uint8Array,
	program: string,
	args: (file: string) => string[]
): string {
	const folder = mkdtempSync(join(tmpdir(), 'platen-pdf-'));
	try {
		const file = join(folder, 'sheet.pdf');
		writeFileSync(file, bytes);
		return execFileSync(program, args(file), { encoding: 'utf8', cwd: folder });
	} finally {
		rmSync(folder, { recursive: true });
	}
}
