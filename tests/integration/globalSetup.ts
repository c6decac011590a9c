import { alone, build } from '../../src/tasks/steps.mjs';

/** What these tests call is the built server: it is built anew when it is not of these sources. */
export default async function setup(): Promise<void> {
	await alone(build);
}
