// Writes the traces of the demo and their truth beside itself: npx tsx reference-data/demo-traces/make.ts
import { writeFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import batteries from '../../seeds/demo-batteries.json' with { type: 'json' };
import jobs from '../../seeds/demo-jobs.json' with { type: 'json' };
import places from '../../seeds/demo-places.json' with { type: 'json' };
import demo from '../../seeds/demo-traces.json' with { type: 'json' };
import { batteryInputSchema } from '../../src/lib/schemas/batteries';
import { dayPlanInputSchema } from '../../src/lib/schemas/day-plans';
import { surveyAnswersSchema } from '../../src/lib/schemas/survey';
import { vehicleInputSchema } from '../../src/lib/schemas/vehicles';
import { coefficientDefaults, parseScenario, type Scenario, type ScenarioInput } from '../../src/lib/thermal';
import type { FitChannel, FitTrace } from '../../src/lib/thermal/fit';
import { buildScenario, DAY_PLAN_TEMPLATES } from '../../src/lib/thermal/survey';
import { inventTrace, writeTraceCsv } from '../../tests/support/invent-trace';

const SEED = 20261203;
const CHANNELS: readonly FitChannel[] = ['bayAirC', 'exhaustShieldC', 'caseC', 'cellC'];
const NOISE = { sdK: 0.3, keepsAMinute: 0.6 };

/** What is true of the vehicle and its battery on all days; everything else is as the mount was assessed. */
const COEFFICIENTS: Record<string, Record<string, number>> = {
	bay: { leakClosed: 27 },
	exhaust: { gasConductanceFull: 55 },
	battery: { caseCellConductance: 3.2 }
};

/** The logger was without supply. */
const GAP = { day: 1, fromMinute: 500, minutes: 50 };
/** A loose plug shows nonsense for one row. */
const SPIKE = { day: 0, channel: 'cellC', atMinute: 400, readsC: 95 } as const;

const LETTERS = 'ABCDEFGH';

function findNamed<T>(things: readonly T[], isIt: (thing: T) => boolean): T {
	const found = things.find(isIt);
	if (!found) throw new Error('The demo data name something that is not there.');
	return found;
}

/** The scenario that the mount of the demo is assessed with, before any book was fitted. */
export function assessedScenario(): ScenarioInput {
	const job = findNamed(jobs, ({ customer }) => customer.name === demo.customer);
	const { survey } = job.mounts[LETTERS.indexOf(demo.mount)]!;
	const battery = findNamed(batteries, ({ maker, model }) => `${maker} ${model}` === job.battery);
	const place = findNamed(places, ({ name }) => name === job.place);
	const { plan } = findNamed(DAY_PLAN_TEMPLATES, ({ id }) => id === job.dayPlan);
	const { hotDayMaxC, dailyRangeK, sunPeakWPerM2, altitudeM } = place;
	const built = buildScenario({
		vehicle: vehicleInputSchema.parse(job.vehicle),
		battery: batteryInputSchema.parse(battery),
		survey: surveyAnswersSchema.parse(survey),
		dayPlan: dayPlanInputSchema.parse(plan),
		hotDay: { hotDayMaxC, dailyRangeK, sunPeakWPerM2 },
		...{ altitudeM, coefficients: coefficientDefaults() }
	});
	return built.scenario;
}

type Day = (typeof demo.days)[number];

/** The legs as they were driven: on a sealed, level road, without the trailer. */
function legsOf({ legs }: Day, loadA: number): ScenarioInput['legs'] {
	return legs.map(({ endMinute, kind, speedKmh }, at) => ({
		minutes: endMinute - (legs[at - 1]?.endMinute ?? 0),
		engineOn: kind === 'driving',
		speedKmh: speedKmh ?? 0,
		loadA
	}));
}

/** A day of the mount as it truly is. */
function trueDay(assessed: ScenarioInput, day: Day): Scenario {
	const changed = Object.entries(COEFFICIENTS).map(([group, values]) => [
		group,
		{ ...(assessed[group as keyof ScenarioInput] as object | undefined), ...values }
	]);
	return parseScenario({
		...{ ...assessed, ...(Object.fromEntries(changed) as Partial<ScenarioInput>) },
		climate: { ...assessed.climate, tMax: day.hottestC, dailyRange: day.dailyRangeK },
		start: { ...assessed.start, hour: day.startHour },
		legs: legsOf(day, demo.loadA)
	});
}

function spoil(trace: FitTrace, at: number): FitTrace {
	const { channels } = trace;
	if (at === SPIKE.day) channels[SPIKE.channel]![SPIKE.atMinute] = SPIKE.readsC;
	if (at === GAP.day) {
		for (const values of Object.values(channels))
			values.fill(NaN, GAP.fromMinute, GAP.fromMinute + GAP.minutes);
	}
	return trace;
}

/** What each file holds, by its name. */
export function makeFiles(): Record<string, string> {
	const assessed = assessedScenario();
	const traces = demo.days.map((day, at) => {
		const scenario = trueDay(assessed, day);
		const invention = { scenario, channels: CHANNELS, noise: NOISE, seed: SEED + at, withCurrent: true };
		return [day.file, writeTraceCsv(spoil(inventTrace(invention), at))];
	});
	const truth = {
		synthetic: true,
		...{ seed: SEED, noise: NOISE, coefficients: COEFFICIENTS, spike: SPIKE, gap: GAP },
		...{ customer: demo.customer, mount: demo.mount, loadA: demo.loadA, days: demo.days, assessed }
	};
	return { ...Object.fromEntries(traces), 'truth.json': JSON.stringify(truth, null, '\t') + '\n' };
}

if (process.argv[1] === fileURLToPath(import.meta.url)) {
	for (const [name, text] of Object.entries(makeFiles())) {
		writeFileSync(new URL(name, import.meta.url), text);
	}
}
