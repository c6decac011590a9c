import { createHash } from 'node:crypto';
import { mkdtempSync, readdirSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { buffer } from 'node:stream/consumers';
import { afterEach, beforeEach, expect, it } from 'vitest';
import { folderStorage } from './folderStorage';
import { FileTooLargeError } from './storage';

let root: string;
beforeEach(() => {
	root = mkdtempSync(join(tmpdir(), 'platen-files-'));
});
afterEach(() => rmSync(root, { recursive: true, force: true }));

async function* parts(...texts: string[]) {
	for (const text of texts) yield await Promise.resolve(Buffer.from(text));
}
const files = () =>
	readdirSync(root, { recursive: true, withFileTypes: true }).filter((entry) => entry.isFile());

it('keeps a file under its own SHA-256, and gives the same bytes back', async () => {
	const storage = folderStorage(root);
	const stored = await storage.putStream(parts('bias,', 'capacitance\n'));
	const sha256 = createHash('sha256').update('bias,capacitance\n').digest('hex');
	expect(stored).toEqual({ key: `${sha256.slice(0, 2)}/${sha256}`, sha256, byteSize: 17 });
	expect((await storage.read(stored.key)).toString()).toBe('bias,capacitance\n');
	expect((await buffer(storage.stream(stored.key))).toString()).toBe('bias,capacitance\n');
});

it('keeps equal content once, however it came', async () => {
	const storage = folderStorage(root);
	const first = await storage.put(Buffer.from('same'));
	expect(await storage.putStream(parts('sa', 'me'))).toEqual(first);
	expect(files()).toHaveLength(1);
});

it('keeps nothing of a file that is too large, or whose source breaks off', async () => {
	const storage = folderStorage(root);
	await expect(storage.putStream(parts('12345', '67890'), 9)).rejects.toThrow(FileTooLargeError);
	expect((await storage.putStream(parts('123456789'), 9)).byteSize).toBe(9);
	async function* breaking() {
		yield await Promise.resolve(Buffer.from('a'));
		throw new Error('the connection broke off');
	}
	await expect(storage.putStream(breaking())).rejects.toThrow('broke off');
	expect(files()).toHaveLength(1);
});

it('says whether files can be written', async () => {
	expect(await folderStorage(root).isWritable()).toBe(true);
	expect(await folderStorage(join(root, 'absent')).isWritable()).toBe(false);
});
