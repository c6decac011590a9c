import type { JobContext } from '../work/jobHandler';

/** Progress through a file: reports every hundredth of it, not every piece. */
export function reportBytes(
	job: JobContext,
	total: number,
	words: string
): (byteCount: number) => void {
	let [done, reported] = [0, 0];
	job.report({ done, total, words });
	return (byteCount) => {
		done += byteCount;
		if (done - reported < total / 100) return;
		reported = done;
		job.report({ done, total, words });
	};
}
