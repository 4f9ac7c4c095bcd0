import { beforeAll, describe, expect, it } from 'vitest';
import { makeAssessableJob } from '../../../../tests/support/assessable-job';
import { listKept } from '../../../../tests/support/mount-files';
import { makeCrew, useTestDatabase, type Crew } from '../../../../tests/support/services';
import { dayText, readAs, sendTrace } from '../../../../tests/support/traces';
import type { SignedInPerson } from '$lib/schemas/people';
import { AuditEntry, Trace } from '../db/models';
import { clearFiles } from './clear-files';
import { getDayPlan } from './day-plans';
import { removeMount } from './mounts';
import { beginReading, followReading } from './trace-reading';
import { binsKeyOf, rawKeyOf } from './trace-bins';
import { legsChangeSchema } from '$lib/schemas/traces';
import { findAir, getCurve, getLegs, planOfTrace, saveLegs as setLegs, useAsDayPlan } from './trace-views';
import { confirmMapping, getTrace, listMountTraces, listTraces, removeTrace, restoreTrace } from './traces';

useTestDatabase();

/** As the form and the API let them in. */
const saveLegs = (person: SignedInPerson, traceId: number, change: object) =>
	setLegs(person, traceId, legsChangeSchema.parse(change));

const DAY_MS = 24 * 60 * 60_000;
let crew: Crew;
let mountId: number;
let jobId: number;

beforeAll(async () => {
	crew = await makeCrew();
	const made = await makeAssessableJob(crew.installer);
	({ jobId } = made);
	mountId = made.hot.id;
});

const contentOf = async (traceId: number): Promise<string> => (await Trace.findByPk(traceId))!.contentId;
const readDay = async (text = dayText()) =>
	readAs(crew.engineer, await sendTrace(crew.engineer, mountId, text));

describe('a file of a logger', () => {
	it('is described first, with its first rows, and read only when its columns are confirmed', async () => {
		const sent = await sendTrace(crew.engineer, mountId, dayText(), 'monday.csv');
		expect(sent).toMatchObject({ state: 'described', name: 'monday.csv', rowsKept: null, legs: [] });
		expect(sent.mapping.time).toMatchObject({ kind: 'calendar', column: 1, order: 'ymd' });
		expect(sent.mapping.columns.map(({ channel }) => channel)).toEqual(['ambientC', 'cellC', 'speedKmh']);
		expect(sent.proposal.firstRows[0]).toEqual(['2026-02-03 00:00:00', '24.0', '25.0', '0']);
		expect(await listKept()).toContain(rawKeyOf(await contentOf(sent.id)));

		const read = await readAs(crew.engineer, sent);
		expect(read).toMatchObject({ state: 'read', rowsKept: 360, isSynthetic: false, startHour: 0 });
		expect(read.span).toMatchObject({ stepS: 60, channels: ['ambientC', 'cellC', 'speedKmh'] });
		const kept = await listKept();
		const contentId = await contentOf(sent.id);
		expect([kept.includes(rawKeyOf(contentId)), kept.includes(binsKeyOf(contentId))]).toEqual([false, true]);
	});

	it('that was sent in before says so, with the first one while that stands', async () => {
		const text = dayText({ date: '2026-03-07' });
		const first = await readDay(text);
		expect(first.sentBefore).toBeNull();
		const again = await sendTrace(crew.engineer, mountId, text, 'again.csv');
		const { id, name, jobNumber, mountLetter } = first;
		expect(again.sentBefore).toEqual({ id, name, jobNumber, mountLetter });
		expect(await readAs(crew.engineer, again)).toMatchObject({ state: 'read', sentBefore: { id } });
		expect((await getTrace(crew.engineer, id)).sentBefore).toBeNull();
		await removeTrace(crew.engineer, id);
		expect((await getTrace(crew.engineer, again.id)).sentBefore).toBeNull();
		const { engineer: neighbour, installer } = await makeCrew();
		const { cool } = await makeAssessableJob(installer);
		expect((await sendTrace(neighbour, cool.id, text)).sentBefore).toBeNull();
	});

	it('is refused in words that point at the place where it is no trace', async () => {
		const before = await listKept();
		const letter = sendTrace(crew.engineer, mountId, 'Dear all,\nnothing was measured.\n');
		await expect(letter).rejects.toMatchObject({
			code: 'invalid_input',
			message: expect.stringContaining('Line 1') as string,
			problems: [{ path: 'file', line: 1 }]
		});
		const timeless = sendTrace(crew.engineer, mountId, 'a,b\n3,20\n1,21\n2,20\n');
		await expect(timeless).rejects.toMatchObject({ problems: [{ code: 'no_time_column', line: 1 }] });
		expect(await listKept()).toEqual(before);
	});

	it('that breaks later says where, and can be read again with other columns', async () => {
		const broken = `Time,Cell (°C),Core 2 (°C)\n${Array.from({ length: 400 }, (_, at) => `2026-02-03 ${String(Math.floor(at / 60)).padStart(2, '0')}:${String(at % 60).padStart(2, '0')}:00,n,2${at % 9}`).join('\n')}\n`;
		const sent = await sendTrace(crew.engineer, mountId, broken);
		const column = { column: 2, channel: 'cellC', unit: '°C', reversed: false } as const;
		const failed = await readAs(crew.engineer, sent, {
			mapping: { ...sent.mapping, columns: [column] }
		});
		expect(failed).toMatchObject({ state: 'failed', failure: { line: 401 } });
		expect(failed.failure!.message).toContain('No row has a time and a number.');
		const other = [{ ...column, column: 3 }];
		const read = await readAs(crew.engineer, failed, { mapping: { ...failed.mapping, columns: other } });
		expect(read).toMatchObject({ state: 'read', failure: null, rowsKept: 400 });
	});

	it('tells what was dropped and what was repaired', async () => {
		const lines = dayText().split('\n');
		lines[10] = lines[10]!.replace(/,[^,]+,([^,]+)$/, ',-127,$1');
		lines.splice(20, 0, 'nonsense', lines[20]!);
		const { report } = await readDay(lines.join('\n'));
		expect(report!.cells.cellC).toMatchObject({ sentinel: 1, values: 360 });
		expect(report!.rows.dropped).toMatchObject({ repeated: 1, shortRow: 1 });
		expect(report!.findings).toContainEqual({ reason: 'sentinel', line: 11, column: 3, value: '-127' });
	});

	it('of a logger that was seen before comes with the columns that were confirmed', async () => {
		const text = (date: string) => dayText({ date, minutes: 30 }).replace('Cell (°C)', 'Probe 7');
		const first = await sendTrace(crew.engineer, mountId, text('2026-02-05'));
		expect(first.proposal.knownSince).toBeNull();
		expect(first.mapping.columns.map(({ channel }) => channel)).toEqual(['ambientC', 'speedKmh']);
		const time = { ...first.mapping.time, timeZone: 'Australia/Darwin' } as typeof first.mapping.time;
		const columns = [
			...first.mapping.columns,
			{ column: 3, channel: 'caseC', unit: '°C', reversed: false } as const
		];
		await readAs(crew.engineer, first, { mapping: { ...first.mapping, time, columns } });
		const second = await sendTrace(crew.engineer, mountId, text('2026-02-06'));
		expect(second.proposal.knownSince).not.toBeNull();
		expect(second.mapping).toEqual({ ...first.mapping, time, columns });
		const { engineer: neighbour, installer } = await makeCrew();
		const { cool } = await makeAssessableJob(installer);
		const elsewhere = await sendTrace(neighbour, cool.id, text('2026-02-07'));
		expect(elsewhere.proposal.knownSince).toBeNull();
	});

	it('is not read twice, nor with columns that it does not have, nor by who saw an older version', async () => {
		const sent = await sendTrace(crew.engineer, mountId, dayText({ minutes: 20 }));
		const confirm = (changes: object) =>
			confirmMapping(crew.engineer, sent.id, {
				...{ mapping: sent.mapping, isSynthetic: false, startHour: null, version: sent.version },
				...changes
			});
		const beyond = [{ column: 9, channel: 'cellC', unit: '°C', reversed: false } as const];
		await expect(confirm({ mapping: { ...sent.mapping, columns: beyond } })).rejects.toMatchObject({
			message: 'The file has no column 9: it has 4.'
		});
		const asSpeed = [{ column: 2, channel: 'cellC', unit: 'km/h', reversed: false } as const];
		await expect(confirm({ mapping: { ...sent.mapping, columns: asSpeed } })).rejects.toMatchObject({
			problems: [{ code: 'wrong_mapping', column: { number: 2 } }]
		});
		await expect(confirm({ version: sent.version + 1 })).rejects.toMatchObject({ code: 'changed_meanwhile' });
		await readAs(crew.engineer, sent);
		await expect(confirm({ version: sent.version + 2 })).rejects.toMatchObject({ code: 'conflict' });
	});

	it('whose reading was broken off with the application is read when somebody looks', async () => {
		const sent = await sendTrace(crew.engineer, mountId, dayText({ minutes: 20 }));
		await Trace.update({ state: 'reading', mappedBy: crew.engineer.id }, { where: { id: sent.id } });
		await beginReading(crew.engineer, sent.id, () => {});
		const shares: number[] = [];
		await followReading(crew.engineer, sent.id, (share) => shares.push(share));
		expect(shares.every((share) => share >= 0 && share <= 1)).toBe(true);
		expect(await getTrace(crew.engineer, sent.id)).toMatchObject({ state: 'read', rowsKept: 20 });
	});
});

describe('a trace that was read', () => {
	it('is drawn between two times with no more points than asked for, and none of its spikes lost', async () => {
		const lines = dayText().split('\n');
		lines[100] = lines[100]!.replace(/,80$/, ',101');
		const { id, span } = await readDay(lines.join('\n'));
		const whole = await getCurve(crew.engineer, id, { points: 20 });
		expect(whole.curves).toHaveLength(3);
		for (const { timeS } of whole.curves) expect(timeS.length).toBeLessThanOrEqual(20);
		const speed = whole.curves.find(({ channel }) => channel === 'speedKmh')!;
		expect(Math.max(...speed.max.map((value) => value ?? 0))).toBe(101);
		const fromS = span!.startS + 99 * 60;
		const near = await getCurve(crew.engineer, id, {
			channels: 'speedKmh',
			fromS,
			toS: fromS + 60,
			points: 20
		});
		expect(near.curves[0]).toMatchObject({ mean: [101] });
		const nothing = getCurve(crew.engineer, id, { fromS: span!.endS, toS: span!.endS + 60, points: 20 });
		await expect(nothing).rejects.toMatchObject({ code: 'invalid_input' });
		const unknown = getCurve(crew.engineer, id, { channels: 'boardC', points: 20 });
		await expect(unknown).rejects.toMatchObject({ problems: [{ path: 'channels' }] });
	});

	it('has its legs proposed, and keeps them as somebody puts them right', async () => {
		const trace = await readDay();
		const { startS } = trace.span!;
		expect(trace.legs.map(({ kind }) => kind)).toEqual(['stopped', 'driving', 'stopped']);
		expect(trace.legsBy).toBe('');
		const at = (minute: number) => startS + 60 * minute;
		const legs = [
			{ endS: at(70), kind: 'stopped' },
			{ endS: at(180), kind: 'driving' },
			{ endS: at(360), kind: 'stopped' }
		] as const;
		const change = { legs: [...legs], version: trace.version };
		const saved = await saveLegs(crew.engineer, trace.id, change);
		expect(saved).toMatchObject({ legsBy: crew.engineer.name, version: trace.version + 1 });
		expect(saved.legs[0]).toMatchObject({ endS: at(70), meanSpeedKmh: expect.closeTo(80 / 7, 4) as number });
		expect(saved.legs.map(({ why }) => why === 'set by hand')).toEqual([true, true, false]);
		expect(await getLegs(crew.manager, trace.id)).toMatchObject({ legs: saved.legs, version: saved.version });
		await expect(saveLegs(crew.manager, trace.id, change)).rejects.toMatchObject({
			code: 'changed_meanwhile'
		});
	});

	it.each([
		['shorter than a minute', [30, 21_600], 'legs[0].endS'],
		['that end before the trace', [3_600, 7_200], 'legs[1].endS']
	])('takes no legs %s', async (_what, ends, path) => {
		const { id, version, span } = await readDay();
		const legs = ends.map((endS) => ({ endS: span!.startS + endS, kind: 'driving' as const }));
		await expect(saveLegs(crew.engineer, id, { legs, version })).rejects.toMatchObject({
			problems: [{ path }]
		});
	});

	it('becomes the day plan of its job, as it was driven', async () => {
		const { id } = await readDay();
		const before = (await getDayPlan(crew.engineer, jobId))!;
		const choices = { name: 'As measured', startSoc: 55, chargerMaxA: 30 };
		const plan = await useAsDayPlan(crew.engineer, id, { ...choices, version: before.version });
		expect(plan).toMatchObject({ name: 'As measured', startSoc: 0.55, chargerMaxA: 30, startHour: 0 });
		expect(plan.legs.map(({ kind, minutes }) => [kind, minutes])).toEqual([
			['stop', 60],
			['drive', 120],
			['stop', 180]
		]);
		expect(plan.legs[1]!.speedKmh).toBeCloseTo(80, 0);
		expect(await getDayPlan(crew.installer, jobId)).toEqual(plan);
	});

	it('without a time of day makes no plan until somebody says when it began', async () => {
		const rows = Array.from({ length: 300 }, (_, at) => `${at * 60},${20 + (at % 3)},${at > 100 ? 60 : 0}`);
		const text = ['seconds,cell,speed', ...rows, ''].join('\n');
		const trace = await readAs(crew.engineer, await sendTrace(crew.engineer, mountId, text));
		expect(trace.startHour).toBeNull();
		const choices = { name: 'Some day', startSoc: 55, chargerMaxA: 30 };
		await expect(planOfTrace(crew.engineer, trace.id, choices)).rejects.toMatchObject({ code: 'conflict' });
		const legs = trace.legs.map(({ endS, kind }) => ({ endS, kind }));
		const change = { legs, startHour: 9.5, version: trace.version };
		expect(await saveLegs(crew.engineer, trace.id, change)).toMatchObject({ startHour: 9.5 });
		expect(await planOfTrace(crew.engineer, trace.id, choices)).toMatchObject({ startHour: 9.5 });
	});

	it('without speeds takes what somebody says of them, and with speeds does not', async () => {
		const rows = Array.from(
			{ length: 120 },
			(_, at) => `2026-02-03 ${at < 60 ? '08' : '09'}:${String(at % 60).padStart(2, '0')},2${at % 5}`
		);
		const silent = await readDay(['Time,Cell (°C)', ...rows, ''].join('\n'));
		const { endS } = silent.span!;
		const drive = { legs: [{ endS, kind: 'driving', speedKmh: 65 }], version: silent.version };
		expect((await saveLegs(crew.engineer, silent.id, drive)).legs[0]).toMatchObject({ meanSpeedKmh: 65 });
		const plan = await planOfTrace(crew.engineer, silent.id, {
			name: 'Quiet',
			startSoc: 50,
			chargerMaxA: 30
		});
		expect(plan.legs).toMatchObject([{ kind: 'drive', speedKmh: 65, minutes: 120 }]);
		const told = await readDay();
		const whole = { legs: [{ endS: told.span!.endS, kind: 'driving', speedKmh: 65 }], version: told.version };
		const { legs } = await saveLegs(crew.engineer, told.id, whole);
		expect(legs[0]!.meanSpeedKmh).toBeCloseTo(80 / 3, 4);
	});

	it('says which design day its outside air is nearest to, where it saw enough of a day', async () => {
		const rows = Array.from({ length: 1440 }, (_, minute) => {
			const hour = minute / 60;
			return `${minute * 60},${(30 + 8 * Math.cos(((hour - 15) / 24) * 2 * Math.PI)).toFixed(2)},25`;
		});
		const text = ['seconds,ambient,cell', ...rows, ''].join('\n');
		const trace = await readAs(crew.engineer, await sendTrace(crew.engineer, mountId, text), {
			startHour: 0
		});
		const air = await findAir(crew.engineer, trace.id);
		const { tMaxC } = air as Extract<typeof air, { tMaxC: number }>;
		expect(tMaxC).toBeGreaterThan(35);
		expect(tMaxC).toBeLessThan(41);
		const whyNone = async (other: string) => findAir(crew.engineer, (await readDay(other)).id);
		expect(await whyNone(dayText({ minutes: 30 }))).toEqual({ whyNone: 'too-little' });
		const cooling = Array.from({ length: 600 }, (_, minute) => {
			const at = `${String(6 + Math.floor(minute / 60)).padStart(2, '0')}:${String(minute % 60).padStart(2, '0')}`;
			return `2026-02-03 ${at},${40 - minute / 60},25`;
		});
		expect(await whyNone(['time,ambient,cell', ...cooling, ''].join('\n'))).toEqual({
			whyNone: 'unlike-a-day'
		});
		expect(await whyNone('time,cell\n2026-02-03 08:00,25\n2026-02-03 08:01,26\n')).toEqual({
			whyNone: 'no-air'
		});
	});

	it('is taken away, can be put back, and is gone for good after its time, with what was kept of it', async () => {
		const { id } = await readDay();
		const key = binsKeyOf(await contentOf(id));
		await removeTrace(crew.engineer, id);
		await expect(getTrace(crew.engineer, id)).rejects.toMatchObject({ code: 'not_found' });
		expect((await listMountTraces(crew.engineer, mountId)).map((row) => row.id)).not.toContain(id);
		await clearFiles(new Date(Date.now() + 29 * DAY_MS));
		expect(await restoreTrace(crew.engineer, id)).toMatchObject({ id, state: 'read' });
		expect(await listKept()).toContain(key);
		await removeTrace(crew.engineer, id);
		await clearFiles(new Date(Date.now() + 31 * DAY_MS));
		await expect(restoreTrace(crew.engineer, id)).rejects.toMatchObject({ code: 'not_found' });
		expect(await listKept()).not.toContain(key);
	});

	it('goes with its mount, and is on record with who sent it and who read it', async () => {
		const { engineer, installer, workshopId } = await makeCrew();
		const { hot } = await makeAssessableJob(installer);
		const { id } = await readAs(engineer, await sendTrace(engineer, hot.id, dayText({ minutes: 20 })));
		const entries = await AuditEntry.findAll({ where: { workshopId, personId: engineer.id } });
		expect(entries.map(({ action }) => action)).toEqual(['trace.added', 'trace.mapped', 'trace.read']);
		await removeMount(installer, hot.id);
		await expect(getTrace(engineer, id)).rejects.toMatchObject({ code: 'not_found' });
		expect(await listTraces(engineer)).toEqual([]);
	});
});

describe('a file whose columns nobody confirmed', () => {
	it('is cleared away after seven days, the file with it', async () => {
		const sent = await sendTrace(crew.engineer, mountId, dayText({ minutes: 20 }));
		const key = rawKeyOf(await contentOf(sent.id));
		await clearFiles(new Date(Date.now() + 6 * DAY_MS));
		expect(await getTrace(crew.engineer, sent.id)).toMatchObject({ state: 'described' });
		await clearFiles(new Date(Date.now() + 8 * DAY_MS));
		await expect(getTrace(crew.engineer, sent.id)).rejects.toMatchObject({ code: 'not_found' });
		expect(await listKept()).not.toContain(key);
	});
});

describe('nobody else', () => {
	it('sees or changes traces: no installer, and no other workshop', async () => {
		const trace = await readDay(dayText({ minutes: 20 }));
		const { engineer: neighbour } = await makeCrew();
		const legs = trace.legs.map(({ endS, kind }) => ({ endS, kind }));
		const ways = (person: typeof neighbour) => [
			() => getTrace(person, trace.id),
			() => getCurve(person, trace.id, { points: 10 }),
			() => getLegs(person, trace.id),
			() => saveLegs(person, trace.id, { legs, version: trace.version }),
			() => listMountTraces(person, mountId),
			() => removeTrace(person, trace.id),
			() => restoreTrace(person, trace.id),
			() => followReading(person, trace.id),
			() => useAsDayPlan(person, trace.id, { name: 'Theirs', startSoc: 50, chargerMaxA: 20, version: 0 })
		];
		for (const way of ways(crew.installer))
			await expect(way()).rejects.toMatchObject({ code: 'not_allowed' });
		for (const way of ways(neighbour)) await expect(way()).rejects.toMatchObject({ code: 'not_found' });
		expect(await listTraces(neighbour)).toEqual([]);
		await expect(sendTrace(neighbour, mountId, dayText())).rejects.toMatchObject({ code: 'not_found' });
		await expect(sendTrace(crew.installer, mountId, dayText())).rejects.toMatchObject({
			code: 'not_allowed'
		});
	});
});
