import { describe, expect, it } from 'vitest';
import type { LedgerEntry } from '../../thermal/assess/types';
import { layOutLedger, sumKelvin } from './heat-ledger';

const LEDGER: LedgerEntry[] = [
	{ source: 'exhaust', watts: 12, kelvin: 10 },
	{ source: 'bay-air', watts: 20, kelvin: 30 },
	{ source: 'outside-air', watts: -25, kelvin: -2 },
	{ source: 'road', watts: 0, kelvin: 0 }
];

describe('the heat ledger', () => {
	it('goes from the warmest share to the coldest and leaves out what is nothing', () => {
		expect(layOutLedger(LEDGER).map(({ words }) => words)).toEqual(['Bay air', 'Exhaust', 'Outside air']);
	});
	it('divides its bar among what warms', () => {
		const parts = layOutLedger(LEDGER).map(({ part }) => part && [part.fromShare, part.toShare]);
		expect(parts).toEqual([[0, 0.75], [0.75, 1], null]);
	});
	it('says figures with sign and unit', () => {
		expect(layOutLedger(LEDGER).map(({ kelvin, watts }) => `${kelvin} ${watts}`)).toEqual([
			'+30.0\u202FK 20\u202FW',
			'+10.0\u202FK 12\u202FW',
			'\u22122.0\u202FK \u221225\u202FW'
		]);
	});
	it('sums to what the cells stand above the outside air', () => {
		expect(sumKelvin(LEDGER)).toBe(38);
	});
	it('has no bar when nothing warms', () => {
		expect(layOutLedger([{ source: 'outside-air', watts: -1, kelvin: -1 }])[0]?.part).toBeNull();
	});
});
