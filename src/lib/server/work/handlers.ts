import { assessReleases } from '../services/assessReleases';
import { computeDistributions } from '../services/computeDistributions';
import { importMeasurementSet } from '../services/importMeasurementSet';
import { fitSweepsJob } from '../services/fitSweepsJob';
import { publishReleaseJob } from '../services/publishReleaseJob';
import { simulateWideningJob } from '../services/curveWidening';
import { readUpload } from '../services/readUpload';
import { renderProof } from '../services/renderProof';
import { verifyEvidence } from '../services/verifyEvidence';
import type { JobHandler } from './jobHandler';

/** Which service does which kind of job. */
export const handlers: Readonly<Record<string, JobHandler>> = {
	'read-upload': readUpload,
	'import-measurement-set': importMeasurementSet,
	'compute-distributions': computeDistributions,
	'fit-sweeps': fitSweepsJob,
	'assess-releases': assessReleases,
	'simulate-widening': simulateWideningJob,
	'verify-evidence': verifyEvidence,
	'render-proof': renderProof,
	'publish-release': publishReleaseJob
};
