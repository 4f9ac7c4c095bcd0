import { expect, it } from 'vitest';
import { makeFittable } from '../../../../tests/support/fit-traces';
import { makeCrew, useTestDatabase } from '../../../../tests/support/services';
import { readAs, sendTrace } from '../../../../tests/support/traces';
import { Assessment, Trace } from '../db/models';
import { traceToFit } from './trace-scenario';

useTestDatabase();

it('a dated trace in a zone that is not UTC is fitted by the hours of its own clock', async () => {
	const { engineer, installer } = await makeCrew();
	const { mountId, traces, texts } = await makeFittable({ engineer, installer });
	const assessment = (await Assessment.findOne({ where: { mountId } }))!;
	const inZone = async (timeZone: string) => {
		const sent = await sendTrace(engineer, mountId, texts[0]!, `${timeZone.replace('/', '-')}.csv`);
		const mapping = { ...sent.mapping, time: { ...sent.mapping.time, timeZone } as never };
		const { id } = await readAs(engineer, sent, { mapping });
		return traceToFit((await Trace.findByPk(id))!, assessment, []);
	};
	expect(traces[0]!.span).toMatchObject({ timeBase: 'utc' });
	const [utc, darwin, phoenix] = [
		await inZone('UTC'),
		await inZone('Australia/Darwin'),
		await inZone('America/Phoenix')
	];
	expect(darwin.trace.startedAtHour).toBe(8);
	expect(darwin.scenario.start.hour).toBe(8);
	expect(darwin.trace.timeS[0]).toBe(30);
	// The clock on the wall reads the same: sun and hours are the same, wherever that wall is.
	expect(darwin).toEqual(utc);
	expect(phoenix).toEqual(utc);
}, 60_000);
