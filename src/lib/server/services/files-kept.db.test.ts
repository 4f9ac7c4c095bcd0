import { readdir } from 'node:fs/promises';
import { join } from 'node:path';
import { beforeAll, describe, expect, it } from 'vitest';
import { contentIdOf, listKept, makeMount } from '../../../../tests/support/mount-files';
import { asIncoming, telephonePhoto } from '../../../../tests/support/pictures';
import { makeCrew, useTestDatabase, type Crew } from '../../../../tests/support/services';
import type { SignedInPerson } from '$lib/schemas/people';
import { AuditEntry, StoredFile } from '../db/models';
import { env } from '../env';
import { answerOnce, keepOnce } from '../http/idempotency';
import { newContentId, storage } from '../storage';
import { findBreak } from './audit';
import { clearFiles, KEEP_REMOVED_DAYS } from './clear-files';
import {
	addFile,
	changeFile,
	keepFile,
	listMountFiles,
	listMountPictures,
	prepareFile,
	readFileContent,
	removeFile,
	restoreFile
} from './files';

useTestDatabase();

let crew: Crew;
let installer: SignedInPerson;
let photo: Buffer;

beforeAll(async () => {
	crew = await makeCrew();
	installer = crew.installer;
	photo = await telephonePhoto(300, 200);
});

const add = (mountId: number, name = 'bracket.jpg') =>
	asIncoming(name, photo, (file) => addFile(installer, mountId, file));

describe('a file that is removed', () => {
	it('is gone for everybody, and comes back with its caption and as the picture', async () => {
		const mount = await makeMount(installer);
		const { id, version } = await add(mount.id);
		await changeFile(installer, id, { caption: 'Bracket', isMountPicture: true, version });
		await removeFile(installer, id);
		expect(await listMountFiles(installer, mount.id)).toEqual([]);
		expect(await listMountPictures(installer, mount.jobId)).toEqual([]);
		await expect(readFileContent(installer, id)).rejects.toMatchObject({ code: 'not_found' });
		await expect(removeFile(installer, id)).rejects.toMatchObject({ code: 'not_found' });
		await restoreFile(installer, id);
		expect(await restoreFile(installer, id)).toMatchObject({ caption: 'Bracket', isMountPicture: true });
		expect((await readFileContent(installer, id)).bytes.byteLength).toBeGreaterThan(0);
	});

	it('is erased after thirty days, its content too, and nothing else', async () => {
		const mount = await makeMount(installer);
		const [old, recent] = [await add(mount.id), await add(mount.id)];
		const [oldContent, recentContent] = [await contentIdOf(old.id), await contentIdOf(recent.id)];
		await removeFile(installer, old.id);
		await removeFile(installer, recent.id);
		const long = new Date(Date.now() - (KEEP_REMOVED_DAYS * 24 + 1) * 60 * 60_000);
		await StoredFile.update({ removedAt: long }, { where: { id: old.id } });
		expect(await clearFiles()).toBe(1);
		expect(await StoredFile.findByPk(old.id)).toBeNull();
		const kept = await listKept();
		expect(kept.filter((key) => key.startsWith(oldContent))).toEqual([]);
		expect(kept.filter((key) => key.startsWith(recentContent))).toHaveLength(2);
		await expect(restoreFile(installer, old.id)).rejects.toMatchObject({ code: 'not_found' });
		expect(await restoreFile(installer, recent.id)).toMatchObject({ id: recent.id });
	});
});

describe('rows and contents', () => {
	const inTwoHours = () => new Date(Date.now() + 2 * 60 * 60_000);

	it('agree: content that has no row is cleared away after an hour, and not before', async () => {
		const mount = await makeMount(installer);
		const file = await add(mount.id);
		const owned = `${await contentIdOf(file.id)}.full`;
		const orphan = `${newContentId()}.full`;
		await storage().put(orphan, Buffer.from('left'));
		await clearFiles();
		expect(await listKept()).toEqual(expect.arrayContaining([orphan, owned]));
		await clearFiles(inTwoHours());
		const kept = await listKept();
		expect(kept).not.toContain(orphan);
		expect(kept).toContain(owned);
	});

	it('agree when the row could not be written', async () => {
		const mount = await makeMount(installer);
		const kept = await listKept();
		const prepared = await asIncoming('a.jpg', photo, prepareFile);
		const keep = keepFile(installer, mount.id, prepared, { questionKey: 'x'.repeat(50) });
		await expect(keep).rejects.toThrow();
		expect(await listKept()).toEqual(kept);
		expect(await listMountFiles(installer, mount.id)).toEqual([]);
	});

	it('are of our own naming, in folders of two letters, with nothing unfinished among them', async () => {
		const mount = await makeMount(installer);
		const file = await add(mount.id, '../../../etc/passwd.jpg');
		expect(file.name).toBe('passwd.jpg');
		const contentId = await contentIdOf(file.id);
		const folder = join(env().SOAKLINE_FILES_DIR, contentId.slice(0, 2));
		const names = await readdir(folder);
		expect(names).toEqual(expect.arrayContaining([`${contentId}.full`, `${contentId}.thumb`]));
		expect(names.filter((name) => name.startsWith('.'))).toEqual([]);
		await expect(storage().read('../../secrets.json')).rejects.toThrow('is not a key');
	});

	it('are told in the trail', async () => {
		const mount = await makeMount(installer);
		const { id } = await add(mount.id);
		await removeFile(installer, id);
		const where = { workshopId: crew.workshopId, subjectType: 'mount', subjectId: mount.id };
		const entries = await AuditEntry.findAll({ where, order: [['sequence', 'ASC']] });
		expect(entries.map(({ action }) => action)).toEqual([
			'mount.added',
			'mount.file-added',
			'mount.file-removed'
		]);
		expect(await findBreak(crew.workshopId)).toBeNull();
	});
});

describe('a file that is sent again with the same key', () => {
	it('is kept once, however parallel', async () => {
		const mount = await makeMount(installer);
		const prepared = await asIncoming('a.jpg', photo, prepareFile);
		let prepares = 0;
		const send = () =>
			keepOnce(
				{ personId: installer.id, key: `photo-${mount.id}`, request: 'the same' },
				() => Promise.resolve((prepares++, prepared)),
				async (ready) => ({ status: 201, body: JSON.stringify(await keepFile(installer, mount.id, ready)) })
			);
		const kept = (await listKept()).length;
		const answers = await Promise.all(Array.from({ length: 8 }, send));
		expect(new Set(answers.map(({ body }) => body)).size).toBe(1);
		expect(await listMountFiles(installer, mount.id)).toHaveLength(1);
		expect(await listKept()).toHaveLength(kept + 2);
		const asked = prepares;
		expect(await send()).toEqual(answers[0]);
		expect(prepares).toBe(asked);
		const other = { personId: installer.id, key: `photo-${mount.id}`, request: 'another' };
		const work = () => Promise.resolve({ status: 201, body: '' });
		await expect(answerOnce(other, work)).rejects.toMatchObject({ code: 'idempotency_key_reused' });
	});
});
