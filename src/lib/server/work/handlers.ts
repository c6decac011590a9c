import { computeDistributions } from '../services/computeDistributions';
import { publishReleaseJob } from '../services/publishReleaseJob';
import { verifyEvidence } from '../services/verifyEvidence';
import type { JobHandler } from './jobHandler';

/** Which service does which kind of job. */
export const handlers: Readonly<Record<string, JobHandler>> = {
	'compute-distributions': computeDistributions,
	'verify-evidence': verifyEvidence,
	'publish-release': publishReleaseJob
};
