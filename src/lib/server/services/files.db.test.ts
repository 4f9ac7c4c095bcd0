import sharp from 'sharp';
import { beforeAll, describe, expect, it } from 'vitest';
import { makeFitted } from '../../../../tests/support/fitted';
import {
	HEIC,
	PDF,
	SVG,
	asIncoming,
	drawNoise,
	hugePng,
	telephonePhoto
} from '../../../../tests/support/pictures';
import { listKept, makeMount } from '../../../../tests/support/mount-files';
import { makeCrew, useTestDatabase, type Crew } from '../../../../tests/support/services';
import { MOST_FILES_OF_MOUNT, MOST_FILE_BYTES, type FilePlace } from '$lib/schemas/files';
import type { SignedInPerson } from '$lib/schemas/people';
import { StoredFile } from '../db/models';
import { newContentId } from '../storage';
import { addFieldNote } from './field-notes';
import {
	addFile,
	changeFile,
	getFile,
	listMountFiles,
	listMountPictures,
	prepareFile,
	readFileContent,
	removeFile,
	restoreFile
} from './files';
import { removeMount } from './mounts';

useTestDatabase();

let crew: Crew;
let installer: SignedInPerson;
let photo: Buffer;

beforeAll(async () => {
	crew = await makeCrew();
	installer = crew.installer;
	photo = await telephonePhoto();
});

const add = (mountId: number, bytes: Uint8Array, name = 'bracket.jpg', place: FilePlace = {}) =>
	asIncoming(name, bytes, (file) => addFile(installer, mountId, file, place));

describe('a photo', () => {
	it('is made anew: upright, without its place, its maker or its owner, beside it a small one', async () => {
		const before = await sharp(photo).metadata();
		expect(before.orientation).toBe(6);
		expect(before.exif!.toString('latin1')).toContain('Pocket 1');
		const mount = await makeMount(installer);
		const file = await add(mount.id, photo);
		expect(file).toMatchObject({ kind: 'photo', name: 'bracket.jpg', widthPx: 900, heightPx: 1200 });
		const full = await readFileContent(installer, file.id);
		const { exif, xmp, iptc, icc, orientation, format, width, height } = await sharp(full.bytes).metadata();
		expect({ exif, xmp, iptc, icc, orientation }).toEqual({});
		expect({ format, width, height }).toEqual({ format: 'jpeg', width: 900, height: 1200 });
		expect(full.bytes.includes('Pocket 1')).toBe(false);
		expect(full).toMatchObject({ media: 'image/jpeg', isDownload: false, sha256: file.sha256 });
		const thumb = await readFileContent(installer, file.id, 'thumb');
		expect(await sharp(thumb.bytes).metadata()).toMatchObject({ format: 'jpeg', width: 300, height: 400 });
	});

	it.each([
		['PNG', () => drawNoise(40, 30).png().toBuffer()],
		['WebP', () => drawNoise(40, 30).webp().toBuffer()]
	])('may come as %s, whatever its name says', async (_kind, make) => {
		const mount = await makeMount(installer);
		const file = await add(mount.id, await make(), 'picture.pdf');
		const { bytes } = await readFileContent(installer, file.id);
		expect(await sharp(bytes).metadata()).toMatchObject({ format: 'jpeg', width: 40, height: 30 });
	});

	it('is kept no larger than 2560 px', async () => {
		const mount = await makeMount(installer);
		const file = await add(mount.id, await drawNoise(5_000, 2_500).jpeg().toBuffer());
		expect(file).toMatchObject({ widthPx: 2560, heightPx: 1280 });
	});

	it('leaves behind whatever was hidden after its end', async () => {
		const mount = await makeMount(installer);
		const page = Buffer.from('<html><script>alert("hidden")</script></html>');
		const file = await add(mount.id, Buffer.concat([photo, page]));
		const { bytes } = await readFileContent(installer, file.id);
		expect(bytes.includes('hidden')).toBe(false);
	});

	it('asks for no more memory when it has a hundred million pixels', async () => {
		const mount = await makeMount(installer);
		const large = await sharp({
			create: { width: 12_000, height: 9_000, channels: 3, background: '#667788' }
		})
			.jpeg()
			.toBuffer();
		const before = process.memoryUsage().rss;
		const file = await add(mount.id, large);
		const UNPACKED_BYTES = 12_000 * 9_000 * 3;
		expect(process.memoryUsage().rss - before).toBeLessThan(UNPACKED_BYTES / 2);
		expect(file).toMatchObject({ widthPx: 2560, heightPx: 1920 });
	});
});

describe('a PDF document', () => {
	it('is kept as it is, and only ever given as a download', async () => {
		const mount = await makeMount(installer);
		const file = await add(mount.id, PDF, 'C:\\papers\\data sheet.pdf');
		expect(file).toMatchObject({ kind: 'document', name: 'data sheet.pdf', widthPx: null });
		const content = await readFileContent(installer, file.id, 'thumb');
		expect(content).toMatchObject({ media: 'application/pdf', isDownload: true, name: 'data sheet.pdf' });
		expect(content.bytes.equals(PDF)).toBe(true);
	});

	it('cannot be the picture of a mount', async () => {
		const mount = await makeMount(installer);
		const { id, version } = await add(mount.id, PDF, 'invoice.pdf');
		await expect(changeFile(installer, id, { isMountPicture: true, version })).rejects.toMatchObject({
			code: 'conflict',
			message: '“invoice.pdf” is a document: only a photo can be the picture of the mount.'
		});
	});
});

describe('what is not what it says', () => {
	const withoutEnd = PDF.subarray(0, PDF.length - 7);
	const REFUSED: [string, string, () => Uint8Array, string][] = [
		['nothing', 'a.jpg', () => new Uint8Array(), '“a.jpg” has nothing in it.'],
		[
			'text',
			'notes.jpg',
			() => Buffer.from('Bought: two bolts'),
			'“notes.jpg” is text, whatever its name says.'
		],
		['a page', 'page.png', () => Buffer.from('<html><script>1</script></html>'), 'is text'],
		['SVG', 'plan.jpg', () => SVG, '“plan.jpg” is a drawing in SVG, which can hold programs.'],
		['SVG without a head', 'plan.svg', () => Buffer.from('<svg width="1"></svg>'), 'is a drawing in SVG'],
		[
			'HEIC',
			'IMG_1.HEIC',
			() => HEIC,
			'is a photo in HEIC, which cannot be read here. Set the camera to JPEG'
		],
		['an archive', 'a.jpg', () => Buffer.from('PK\x03\x04\x14\0\0\0', 'latin1'), 'is a file of the kind ZIP'],
		['noise', 'a.jpg', () => Buffer.from([1, 2, 3, 0, 9]), 'is neither a photo nor a PDF document'],
		['half a photo', 'a.jpg', () => photo.subarray(0, photo.length / 2), 'breaks off or is damaged'],
		[
			'a page behind the first bytes of a photo',
			'a.jpg',
			() => Buffer.concat([Buffer.from([0xff, 0xd8, 0xff, 0xe0]), Buffer.from('<script>alert(1)</script>')]),
			'breaks off or is damaged'
		],
		[
			'a picture too large to unpack',
			'a.png',
			() => hugePng(50_000, 50_000),
			'“a.png” has 50,000 × 50,000 pixels. At most 120 million are taken'
		],
		['a PDF without its end', 'a.pdf', () => withoutEnd, 'begins as a PDF document, but does not end as one'],
		[
			'a PDF with an archive behind it',
			'a.pdf',
			() => Buffer.concat([PDF, Buffer.from('PK\x03\x04 more')]),
			'does not end as one'
		]
	];

	it.each(REFUSED)('is refused in words: %s', async (_what, name, make, words) => {
		const mount = await makeMount(installer);
		const kept = await listKept();
		await expect(add(mount.id, make(), name)).rejects.toMatchObject({
			...{ code: 'invalid_input', status: 422, problems: [{ path: 'file' }] },
			message: expect.stringContaining(words)
		});
		expect(await listMountFiles(installer, mount.id)).toEqual([]);
		expect(await listKept()).toEqual(kept);
	});

	it('is refused as too large with its name and the limit', async () => {
		const given = { name: 'film.jpg', path: 'was read past', isTooLarge: true };
		await expect(prepareFile(given)).rejects.toMatchObject({
			...{ code: 'too_large', status: 413, problems: [{ limit: `${MOST_FILE_BYTES} bytes` }] },
			message: '“film.jpg” is larger than 20\u202FMB. That is the most that is taken: send a smaller one.'
		});
	});
});

describe('where a file belongs', () => {
	it('is its mount, one of its questions, or one of its notes', async () => {
		const { installer } = await makeCrew();
		const add = (mountId: number, bytes: Uint8Array, name = 'a.jpg', place: FilePlace = {}) =>
			asIncoming(name, bytes, (file) => addFile(installer, mountId, file, place));
		const { mountId, otherMountId } = await makeFitted(installer);
		const { rows } = await addFieldNote(installer, mountId, {
			...{ kind: 'inspection', notedOn: '2026-02-02', words: 'All tight.' }
		});
		const fieldNoteId = rows[0]!.id;
		const small = await drawNoise(20, 20).jpeg().toBuffer();
		const [ofMount, ofQuestion, ofNote] = [
			await add(mountId, small),
			await add(mountId, small, 'fuse.jpg', { questionKey: 'fuse' }),
			await add(mountId, small, 'note.jpg', { fieldNoteId })
		];
		const ids = async (place?: FilePlace) =>
			(await listMountFiles(installer, mountId, place)).map(({ id }) => id);
		expect(await ids()).toEqual([ofMount.id, ofQuestion.id, ofNote.id]);
		expect(await ids({ questionKey: 'fuse' })).toEqual([ofQuestion.id]);
		expect(await ids({ fieldNoteId })).toEqual([ofNote.id]);
		await expect(add(otherMountId, small, 'x.jpg', { fieldNoteId })).rejects.toMatchObject({
			...{ code: 'invalid_input', problems: [{ path: 'fieldNoteId' }] }
		});
	});

	it('is known to its own workshop alone', async () => {
		const mount = await makeMount(installer);
		const { id, version } = await add(mount.id, photo);
		const { installer: stranger } = await makeCrew();
		const notThere = { code: 'not_found' };
		await expect(listMountFiles(stranger, mount.id)).rejects.toMatchObject(notThere);
		await expect(getFile(stranger, id)).rejects.toMatchObject(notThere);
		await expect(readFileContent(stranger, id)).rejects.toMatchObject(notThere);
		await expect(changeFile(stranger, id, { caption: 'Mine', version })).rejects.toMatchObject(notThere);
		await expect(removeFile(stranger, id)).rejects.toMatchObject(notThere);
		await expect(restoreFile(stranger, id)).rejects.toMatchObject(notThere);
		const send = asIncoming('a.jpg', photo, (file) => addFile(stranger, mount.id, file));
		await expect(send).rejects.toMatchObject(notThere);
		const { customer } = crew;
		await expect(readFileContent(customer, id)).rejects.toMatchObject({ code: 'not_allowed' });
	});

	it('goes with its mount, and comes back with it', async () => {
		const mount = await makeMount(installer);
		const { id } = await add(mount.id, photo);
		await removeMount(installer, mount.id);
		await expect(readFileContent(installer, id)).rejects.toMatchObject({ code: 'not_found' });
	});

	it(`takes ${MOST_FILES_OF_MOUNT} files a mount`, async () => {
		const mount = await makeMount(installer);
		const first = await add(mount.id, await drawNoise(9, 9).jpeg().toBuffer());
		const { id: _id, contentId: _contentId, ...row } = (await StoredFile.findByPk(first.id))!.get();
		await StoredFile.bulkCreate(
			Array.from({ length: MOST_FILES_OF_MOUNT - 1 }, () => ({ ...row, contentId: newContentId() }))
		);
		const kept = (await listKept()).length;
		await expect(add(mount.id, photo)).rejects.toMatchObject({ code: 'conflict' });
		expect(await listKept()).toHaveLength(kept);
		await removeFile(installer, first.id);
		await add(mount.id, photo);
		await expect(restoreFile(installer, first.id)).rejects.toMatchObject({ code: 'conflict' });
	});
});

describe('the picture of a mount', () => {
	it('is one, and changes hands', async () => {
		const mount = await makeMount(installer);
		const [one, two] = [await add(mount.id, photo), await add(mount.id, photo)];
		await changeFile(installer, one.id, { isMountPicture: true, version: one.version });
		await changeFile(installer, two.id, { isMountPicture: true, caption: 'Left', version: two.version });
		const marked = (await listMountFiles(installer, mount.id)).map((file) => file.isMountPicture);
		expect(marked).toEqual([false, true]);
		expect(await listMountPictures(installer, mount.jobId)).toMatchObject([{ id: two.id, caption: 'Left' }]);
		const { version } = await getFile(installer, two.id);
		await changeFile(installer, two.id, { isMountPicture: false, version });
		expect(await listMountPictures(installer, mount.jobId)).toEqual([]);
	});

	it('is one, even when several are chosen at the same moment', async () => {
		const mount = await makeMount(installer);
		const files = [await add(mount.id, photo), await add(mount.id, photo), await add(mount.id, photo)];
		await Promise.all(
			files.map(({ id, version }) => changeFile(installer, id, { isMountPicture: true, version }))
		);
		const marked = (await listMountFiles(installer, mount.id)).filter((file) => file.isMountPicture);
		expect(marked).toHaveLength(1);
	});

	it('is kept against an older version', async () => {
		const mount = await makeMount(installer);
		const { id, version } = await add(mount.id, photo);
		await changeFile(installer, id, { caption: 'Bracket', version });
		await expect(changeFile(installer, id, { caption: 'Other', version })).rejects.toMatchObject({
			code: 'changed_meanwhile'
		});
		expect(await getFile(installer, id)).toMatchObject({ caption: 'Bracket' });
		const { version: newest } = await getFile(installer, id);
		await changeFile(installer, id, { isMountPicture: true, version: newest });
		expect(await getFile(installer, id)).toMatchObject({ caption: 'Bracket', isMountPicture: true });
	});
});
