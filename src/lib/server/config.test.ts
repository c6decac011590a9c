import { chmodSync, existsSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, expect, it } from 'vitest';
import { ConfigError, readConfig } from './config';

let folder: string;
beforeEach(() => {
	folder = mkdtempSync(join(tmpdir(), 'platen-config-'));
});
afterEach(() => {
	chmodSync(folder, 0o700);
	rmSync(folder, { recursive: true, force: true });
});

it('puts the database and the files into the data folder, and makes it', () => {
	const config = readConfig({ DATA_DIR: join(folder, 'new') });
	expect(config).toMatchObject({
		port: 3000,
		isDemo: false,
		dataDir: join(folder, 'new'),
		databaseUrl: `file://${join(folder, 'new', 'platen.db')}`,
		storageFolder: join(folder, 'new', 'files')
	});
	expect(existsSync(join(folder, 'new', 'files'))).toBe(true);
});

it('takes what is given', () => {
	const config = readConfig({
		DATA_DIR: folder,
		PORT: '5000',
		ORIGIN: 'https://platen.example/',
		DEMO: '1',
		DATABASE_URL: 'libsql://db.example',
		STORAGE_URL: `file:${folder}/kept`
	});
	expect(config).toMatchObject({
		port: 5000,
		origin: 'https://platen.example',
		isDemo: true,
		databaseUrl: 'libsql://db.example',
		storageFolder: join(folder, 'kept')
	});
});

it('names every variable that is wrong, and no value', () => {
	const read = () =>
		readConfig({
			DATA_DIR: folder,
			PORT: 'secret-port',
			ORIGIN: 'secret-origin',
			DATABASE_URL: 'postgres://secret@host',
			STORAGE_URL: 'ftp://secret',
			DEMO: 'yes-secret'
		});
	expect(read).toThrow(ConfigError);
	let said = '';
	try {
		read();
	} catch (problem) {
		said = problem instanceof Error ? problem.message : '';
	}
	for (const name of ['PORT', 'ORIGIN', 'DATABASE_URL', 'STORAGE_URL', 'DEMO'])
		expect(said).toContain(`${name}: `);
	expect(said).not.toContain('secret');
});

it('refuses a data folder that is a file', () => {
	writeFileSync(join(folder, 'file'), '');
	expect(() => readConfig({ DATA_DIR: join(folder, 'file') })).toThrow(/DATA_DIR: the folder/);
});
