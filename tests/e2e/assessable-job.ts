import { randomUUID } from 'node:crypto';
import { expect, type Page } from '@playwright/test';

type Json = Record<string, unknown>;

/** Asks the application's own interface as the person who is signed in on the page. */
export async function ask(
	page: Page,
	method: 'GET' | 'POST' | 'PUT',
	path: string,
	data?: Json
): Promise<Json> {
	// A connection that stood idle too long is closed by the server: then it is opened anew.
	const response = await page.request.fetch(path, { method, maxRetries: 2, ...(data ? { data } : {}) });
	expect(response.ok(), `${method} ${path}: ${response.status()} ${await response.text()}`).toBe(true);
	return (await response.json()) as Json;
}

const drive = (minutes: number, speedKmh: number, surface = 'sealed'): Json => ({
	...{ kind: 'drive', minutes, speedKmh, surface, gradePercent: 0 },
	...{ towing: true, engineOn: true, bonnetOpen: false, loadA: 4 }
});
const stop = (kind: 'stop' | 'camp', minutes: number): Json => ({
	...{ kind, minutes, speedKmh: 0, surface: 'sealed', gradePercent: 0 },
	...{ towing: false, engineOn: false, bonnetOpen: kind === 'camp', loadA: 5 }
});

/** A hot day with a trailer: long drives, short stops, camp at dusk. */
export const HOT_DAY: Json[] = [
	...[drive(150, 90), stop('stop', 20), drive(150, 60, 'corrugated'), stop('stop', 40)],
	...[drive(150, 60, 'corrugated'), stop('stop', 15), drive(90, 90), stop('camp', 780)]
];
/** As many legs as a plan takes. */
export const CROWDED_DAY: Json[] = Array.from({ length: 24 }, () => [
	drive(25, 60, 'corrugated'),
	stop('stop', 5)
]).flat();

const HOT_CORNER: Json = {
	...{ positionKind: 'under-bonnet', bayPlace: 'firewall-exhaust', exhaustFacing: 'square-on' },
	...{ exhaustGapMm: 60, exhaustSeenWidthMm: 400, exhaustSeenHeightMm: 200 },
	...{ exhaustBatterySide: 'long-side', engineFacing: 'square-on', engineGapMm: 80 },
	...{ engineSeenWidthMm: 400, engineSeenHeightMm: 300, engineBatterySide: 'end' },
	...{ bonnetGapMm: 40, bonnetLining: 'bare', airPath: 'closed-corner', trayMaterial: 'steel' },
	...{ trayThicknessMm: 3, trayLengthMm: 360, trayWidthMm: 205, trayMat: 'none' },
	...{ trayUnderside: 'bay-air', shieldKind: 'none' }
};
const COOLED_CABIN: Json = {
	...{ positionKind: 'cabin', enclosureCooling: 'cooled', enclosureSun: 'shaded' }
};
const SURVEYS: Json[] = [HOT_CORNER, COOLED_CABIN];

const LITHIUM: Json = {
	...{ chemistry: 'lithium-iron-phosphate', capacityAh: 100, massKg: 12.85, internalResistanceMohm: 12 },
	...{ sensor: 'cells', chargeCutC: 60, chargeResetC: 50, dischargeCutC: 75, dischargeResetC: 62 },
	...{ cutDelayS: 0, autoReset: true }
};
/** Nothing switches it off. */
export const FLOODED: Json = {
	...{ chemistry: 'lead-acid-flooded', capacityAh: 100, massKg: 27, internalResistanceMohm: 5 },
	...{ highestChargeC: 50, highestUseC: 60, ratedLifeYears: 5, compensatesCharge: false }
};

export interface AssessableJob {
	jobId: number;
	mountIds: number[];
	customerName: string;
}

async function addMount(page: Page, jobId: unknown, index: number): Promise<number> {
	const survey = SURVEYS[index % SURVEYS.length]!;
	const { positionKind } = survey;
	const name = positionKind === 'cabin' ? `Behind seat ${index}` : `Exhaust corner ${index}`;
	const mount = await ask(page, 'POST', `/api/v1/jobs/${String(jobId)}/mounts`, { name, positionKind });
	await ask(page, 'PUT', `/api/v1/mounts/${String(mount.id)}/survey`, {
		...{ survey, complete: true, version: mount.version }
	});
	return mount.id as number;
}

/** A job of its own with all that an assessment needs: an exhaust corner, a cooled cabin, and so on in turn. */
export async function makeAssessableJob(
	page: Page,
	{
		mounts = 2,
		legs = HOT_DAY,
		battery: kind = LITHIUM
	}: { mounts?: number; legs?: Json[]; battery?: Json } = {}
): Promise<AssessableJob> {
	const tag = randomUUID().slice(0, 8);
	const customerName = `Ilse Tarn ${tag}`;
	const job = await ask(page, 'POST', '/api/v1/jobs', {
		...{ customerName, make: 'Marlow', model: `Ridge ${tag}`, modelYear: 2019, engineLayout: 'inline' },
		...{ massKg: 3100, dragAreaM2: 1.35, towMassKg: 1800, towDragAreaM2: 1 }
	});
	const battery = await ask(page, 'POST', '/api/v1/batteries', {
		...{ maker: 'Cindervale', model: `Trial ${tag}`, ...kind },
		...{ lengthMm: 320, widthMm: 165, heightMm: 215, maxChargeA: 50 },
		...{ underBonnet: 'excluded', underBonnetWords: 'Not for engine compartments.' },
		dataSheet: 'Invented for the tests, page 2'
	});
	const place = await ask(page, 'POST', '/api/v1/places', {
		...{ name: `Salt Lake ${tag}`, region: 'North', latitudeDeg: -28, longitudeDeg: 137, altitudeM: 20 },
		...{ climateZone: 'BWh', hotDayMaxC: 44, dailyRangeK: 15, sunPeakWPerM2: 1050 },
		source: 'Invented for the tests'
	});
	const path = `/api/v1/jobs/${String(job.id)}`;
	const { version } = await ask(page, 'PUT', `${path}/battery`, {
		...{ batteryRecordId: battery.id, version: job.version }
	});
	await ask(page, 'PUT', `${path}/climate`, {
		...{ placeId: place.id, hotDayMaxC: 44, dailyRangeK: 15, sunPeakWPerM2: 1050, version }
	});
	await ask(page, 'PUT', `${path}/day-plan`, {
		...{ name: 'Long hot day, towing', startHour: 7, startSoc: 0.55, chargerMaxA: 40, legs, version: null }
	});
	const mountIds: number[] = [];
	for (let index = 0; index < mounts; index++) mountIds.push(await addMount(page, job.id, index));
	return { jobId: job.id as number, mountIds, customerName };
}

/** Assesses every mount of the job; gives the assessments in the order of their mounts. */
export async function assessAll(page: Page, jobId: number): Promise<Json[]> {
	return (await ask(page, 'POST', `/api/v1/jobs/${jobId}/assessments`)).rows as Json[];
}
