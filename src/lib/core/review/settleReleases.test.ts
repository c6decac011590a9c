import { expect, it } from 'vitest';
import { releasesOn, settleReleases, type SettledRelease } from './settleReleases';

const release = (
	id: number,
	version: string,
	state: SettledRelease['state'],
	effectiveFrom: string
): SettledRelease => {
	const [major = 0, minor = 0] = version.split('.').map(Number);
	return { id, major, minor, state, effectiveFrom };
};

it('leaves a scheduled release alone the day before it takes effect', () => {
	const releases = [
		release(1, '1.0', 'current', '2026-01-01'),
		release(2, '2.0', 'scheduled', '2026-03-01')
	];
	expect(settleReleases(releases, '2026-02-28')).toEqual([]);
});

it('lets it replace the current one on its day', () => {
	const releases = [
		release(1, '1.0', 'current', '2026-01-01'),
		release(2, '2.0', 'scheduled', '2026-03-01')
	];
	expect(settleReleases(releases, '2026-03-01')).toEqual([
		{ id: 2, event: 'becomeEffective', to: 'current' },
		{ id: 1, event: 'supersede', to: 'superseded' }
	]);
});

it('supersedes a scheduled release that a higher version overtook', () => {
	const releases = [
		release(2, '2.0', 'scheduled', '2026-03-10'),
		release(3, '2.1', 'current', '2026-03-05')
	];
	expect(settleReleases(releases, '2026-03-10')).toEqual([
		{ id: 2, event: 'supersede', to: 'superseded' }
	]);
});

it('compares versions by number, not by text', () => {
	const releases = [
		release(1, '1.9', 'current', '2026-01-01'),
		release(2, '1.10', 'scheduled', '2026-03-01')
	];
	expect(releasesOn(releases, '2026-03-01').map(({ state }) => state)).toEqual([
		'superseded',
		'current'
	]);
});

it('brings back no older release when the current one is withdrawn', () => {
	const releases = [
		release(1, '1.0', 'superseded', '2026-01-01'),
		release(2, '2.0', 'withdrawn', '2026-02-01')
	];
	expect(settleReleases(releases, '2026-03-01')).toEqual([]);
});
