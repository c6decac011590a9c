import { computeDistributions } from '../services/computeDistributions';
import { publishReleaseJob } from '../services/publishReleaseJob';
import { renderProof } from '../services/renderProof';
import { verifyEvidence } from '../services/verifyEvidence';
import type { JobHandler } from './jobHandler';

/** Which service does which kind of job. */
export const handlers: Readonly<Record<string, JobHandler>> = {
	'compute-distributions': computeDistributions,
	'verify-evidence': verifyEvidence,
	'render-proof': renderProof,
	'publish-release': publishReleaseJob
};
