import { limitMessages } from '../../messages/limits';

/** A rarer device than one in twenty samples of this size is beyond what the sample can show. */
const SEEN_IN_TWENTY_SAMPLES = 0.05;

/** Says when the sample can't speak about the content, so that the limit rests on the model alone. */
export function contentWarning(content: number, sampleSize: number): string[] {
	return sampleSize * (1 - content) < SEEN_IN_TWENTY_SAMPLES
		? [limitMessages.contentBeyondSample(content, sampleSize)]
		: [];
}
