import type { Storage } from '$lib/server/storage/storage';

const refuse = () => {
	throw new Error('this test reads and writes no file');
};

/** For what must not touch files. */
export const unreachableStorage: Storage = {
	put: refuse,
	putStream: refuse,
	read: refuse,
	stream: refuse,
	isWritable: refuse
};
