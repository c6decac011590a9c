import { attempts } from './attempts';
import type { Attempts } from './attempts';

const QUARTER_HOUR = 900;

/** Tries to sign in, counted for the person who is meant and for the place they come from. */
export interface SignInAttempts {
	readonly byEmail: Attempts;
	readonly byAddress: Attempts;
}

/** Ten tries a quarter of an hour for a person; more for an address, behind which many may sit. */
export const signInAttempts = (): SignInAttempts => ({
	byEmail: attempts(10, QUARTER_HOUR),
	byAddress: attempts(50, QUARTER_HOUR)
});
