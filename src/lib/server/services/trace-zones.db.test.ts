import { beforeEach, describe, expect, it } from 'vitest';
import { makeAssessableJob } from '../../../../tests/support/assessable-job';
import { makeCrew, useTestDatabase, type Crew } from '../../../../tests/support/services';
import { dayText, readAs, sendTrace } from '../../../../tests/support/traces';
import { Job, Place } from '../db/models';
import { confirmMapping } from './traces';

useTestDatabase();

let crew: Crew;
let jobId: number;
let mountId: number;

beforeEach(async () => {
	crew = await makeCrew();
	const made = await makeAssessableJob(crew.installer);
	({ jobId } = made);
	mountId = made.hot.id;
});

/** Puts the job at a place, and says what that is called. */
async function moveTo(latitudeDeg: number, longitudeDeg: number): Promise<string> {
	const { placeId } = (await Job.findByPk(jobId))!;
	await Place.update({ latitudeDeg, longitudeDeg }, { where: { id: placeId! } });
	return (await Place.findByPk(placeId!))!.name;
}
const send = (text = dayText({ minutes: 30 })) => sendTrace(crew.engineer, mountId, text);
const zoneNotes = ({ proposal }: Awaited<ReturnType<typeof send>>) =>
	proposal.notes.filter((note) => note.includes('time zone'));

describe('the time zone of a file that says none', () => {
	it('is proposed where the place of the job is clear, in words that claim no more', async () => {
		const name = await moveTo(-12.46, 130.84);
		const sent = await send();
		expect(sent.mapping.time).toMatchObject({ timeZone: 'Australia/Darwin' });
		expect(zoneNotes(sent)).toEqual([
			`The file says no time zone: Australia/Darwin is proposed, as it is near ${name}, the place of the job. Look whether the logger’s clock kept it.`
		]);
	});

	it('is left open where clocks differ around the place, and not read before somebody says it', async () => {
		await moveTo(-23.7, 133.88);
		const sent = await send();
		expect(sent.mapping.time).toMatchObject({ timeZone: '' });
		expect(zoneNotes(sent)).toHaveLength(1);
		expect(zoneNotes(sent)[0]).toMatch(
			/clocks differ: .*perhaps Australia\/Darwin, .* or Australia\/Eucla\.$/
		);
		const { mapping, version } = sent;
		const change = { mapping, isSynthetic: false, startHour: null, version };
		await expect(confirmMapping(crew.engineer, sent.id, change)).rejects.toMatchObject({
			code: 'invalid_input'
		});
	});

	it('is left open where the job has no place', async () => {
		await Job.update({ placeId: null }, { where: { id: jobId } });
		const sent = await send();
		expect(sent.mapping.time).toMatchObject({ timeZone: '' });
		expect(zoneNotes(sent)[0]).toContain('the job has no place');
	});

	it('is the one that was confirmed for the logger, and nothing else is said beside it', async () => {
		await moveTo(-23.7, 133.88);
		const first = await send();
		const time = { ...first.mapping.time, timeZone: 'Asia/Tokyo' } as never;
		await readAs(crew.engineer, first, { mapping: { ...first.mapping, time } });
		await moveTo(-12.46, 130.84);
		const next = await send(dayText({ minutes: 20 }));
		expect(next.mapping.time).toMatchObject({ timeZone: 'Asia/Tokyo' });
		expect(zoneNotes(next)).toEqual([
			'The file says no time zone: Asia/Tokyo stands there as it was confirmed for this logger before.'
		]);
	});

	it('is open for another logger, whatever was said of the first', async () => {
		await moveTo(-12.46, 130.84);
		const first = await send();
		const time = { ...first.mapping.time, timeZone: 'Asia/Tokyo' } as never;
		await readAs(crew.engineer, first, { mapping: { ...first.mapping, time } });
		const other = await send(dayText({ minutes: 20 }).replace('Cell (°C)', 'Probe 9'));
		expect(other.mapping.time).toMatchObject({ timeZone: 'Australia/Darwin' });
	});
});
