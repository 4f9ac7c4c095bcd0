import { describe, expect, it } from 'vitest';
import type { LeadAcidFigures } from '../thermal/assess/types';
import { describeVerdict, type VerdictFacts } from './describe-verdict';

/** Thin spaces read as plain ones here. */
const say = (
	changes: Partial<VerdictFacts> & { chemistry?: string },
	audience?: 'workshop' | 'customer'
): string => describeVerdict({ ...HOT_DAY, ...changes }, audience).sentence.replace(/\u202F/g, ' ');

const HOT_DAY: VerdictFacts = {
	verdict: 'cuts-out',
	cutAtHour: 16.85,
	resetAtHour: 20.8667,
	backByItself: true,
	darkHours: 4.0167,
	headroomK: -0.5,
	peakCellsC: 80.5,
	peakAtHour: 17.05,
	chargeMissedAh: 0,
	chargeMissedHours: 0,
	campHour: 18.9
};
const MILD_DAY = { cutAtHour: null, resetAtHour: null, darkHours: 0, backByItself: false } as const;

describe('a day on which the battery cuts out', () => {
	it('says when the fridge goes dark, how long before camp, and when it comes back', () => {
		expect(describeVerdict(HOT_DAY).headline).toBe('Cuts out');
		expect(say({})).toBe(
			'The fridge goes dark at 16:51, two hours before camp, and comes back by itself at 20:52.'
		);
	});

	it('says it after reaching camp, and at the moment of reaching it', () => {
		expect(say({ campHour: 16.35 })).toContain('16:51, half an hour after reaching camp, and comes back');
		expect(say({ campHour: 16.9 })).toContain('16:51, just as camp is reached, and comes back');
	});

	it('leaves camp out where the day has none', () => {
		expect(say({ campHour: null })).toBe('The fridge goes dark at 16:51 and comes back by itself at 20:52.');
	});

	it('promises no return that the plan does not show', () => {
		expect(say({ resetAtHour: null, backByItself: false })).toBe(
			'The fridge goes dark at 16:51, two hours before camp, and is still dark when the plan ends.'
		);
	});

	it('says that it goes dark a second time', () => {
		expect(say({ darkHours: 6 })).toContain(
			'comes back by itself at 20:52, then goes dark again: 6 h in all.'
		);
	});

	it('names the next day when the return is after midnight', () => {
		expect(say({ resetAtHour: 25.5, darkHours: 8.65 })).toContain('comes back by itself at 01:30 next day.');
	});
});

describe('a day that the battery gets through', () => {
	it('gives the peak and the room that was left', () => {
		const words = say({ ...MILD_DAY, verdict: 'rides-it-out', headroomK: 14.2, peakCellsC: 65.8 });
		expect(words).toBe(
			'The fridge stays on all day. The cells are hottest at 17:03: 66 °C, 14.2 K short of going dark.'
		);
	});

	it('says that it was close', () => {
		const words = say({ ...MILD_DAY, verdict: 'runs-close', headroomK: 2.1, peakCellsC: 77.9 });
		expect(words).toBe(
			'The fridge stays on, but only just: at 17:03 the cells reach 78 °C, 2.1 K short of going dark.'
		);
	});

	it('says that it is the charge that it runs close with, where there is room for more heat', () => {
		const facts = { ...MILD_DAY, verdict: 'runs-close', headroomK: 18.3, peakCellsC: 46.7 } as const;
		const missed = { ...facts, chargeMissedAh: 63, chargeMissedHours: 5 };
		expect(say(missed)).toBe(
			'The fridge stays on all day, but the heat keeps the battery from charging as it should. The cells are hottest with 47 °C at 17:03, 18.3 K short of going dark. Heat stops the charging for five hours: 63 Ah missed.'
		);
		expect(say(missed, 'customer')).toMatch(/^The fridge stays on all day, but the heat keeps the battery/);
	});

	it('says what heat kept out of the battery', () => {
		const words = say({ ...MILD_DAY, verdict: 'runs-close', chargeMissedAh: 31.2, chargeMissedHours: 2.4 });
		expect(words).toMatch(/Heat stops the charging for two and a half hours: 31 Ah missed\.$/);
	});
});

describe('for the customer', () => {
	it.each(['rides-it-out', 'runs-close', 'cuts-out'] as const)(
		'uses no word of the trade (%s)',
		(verdict) => {
			const facts = verdict === 'cuts-out' ? {} : MILD_DAY;
			const words = say({ ...facts, verdict, chargeMissedAh: 31, chargeMissedHours: 2 }, 'customer');
			expect(words).not.toMatch(/\bcells?\b|\bK\b|\bAh\b|headroom|BMS|reset|°C/);
			expect(words).toMatch(/^The fridge .*too hot to charge/);
		}
	);
});

describe('a battery that nothing switches off', () => {
	const leadAcid: LeadAcidFigures = {
		...{ useLimitC: 60, chargeLimitC: 50, tooHotAtHour: 16.85, hoursAboveUseLimit: 2.1667 },
		...{ hoursAboveChargeLimit: 0, peakChargingC: 48, chargerCompensates: false },
		...{ compensatedChargeV: 13.4, uncompensatedChargeV: 14.4 },
		...{ freshAirM3PerH: 0.24, openingCm2: 6.72, sparkFreeMm: 267 }
	};
	const tooHot = { ...MILD_DAY, chemistry: 'lead-acid-agm', headroomK: -6, peakCellsC: 66, leadAcid };

	it('gets too hot: says from when, for how long, and that it is not switched off', () => {
		expect(describeVerdict({ ...HOT_DAY, ...tooHot }).headline).toBe('Gets too hot');
		expect(say(tooHot)).toBe(
			'From 16:51, two hours before camp, the battery is hotter than the 60 °C that it may have in use, for 2 h 10 min in all. Nothing switches it off: the cells reach 66 °C at 17:03.'
		);
		expect(say(tooHot, 'customer')).toBe(
			'From 16:51, two hours before camp, the battery is hotter than its maker allows, for 2 h 10 min in all. Nothing switches it off: the fridge stays on, and the battery takes harm.'
		);
	});

	it('runs close: says how close, and that it is charged too hot', () => {
		const cooler = { ...leadAcid, tooHotAtHour: null, hoursAboveUseLimit: 0 };
		const close = { ...tooHot, verdict: 'runs-close', headroomK: 8, peakCellsC: 52 } as const;
		const charged = { ...cooler, hoursAboveChargeLimit: 1.5, peakChargingC: 52 };
		expect(say({ ...close, leadAcid: charged })).toBe(
			'The battery bears the day: at 17:03 the cells reach 52 °C, 8.0 K short of the 60 °C that it may have in use. For 1 h 30 min it is charged above 50 °C, at up to 52 °C.'
		);
		expect(say({ ...close, leadAcid: charged }, 'customer')).toContain(
			'For an hour and a half it is charged hotter than its maker allows'
		);
		expect(say({ ...close, headroomK: 3, leadAcid: cooler })).not.toContain('charged');
	});

	it('bears the day where it stays cool', () => {
		const cool = { ...leadAcid, tooHotAtHour: null, hoursAboveUseLimit: 0 };
		const mild = {
			...tooHot,
			verdict: 'rides-it-out',
			headroomK: 15,
			peakCellsC: 45,
			leadAcid: cool
		} as const;
		expect(say(mild)).toBe(
			'The battery bears the day: at 17:03 the cells reach 45 °C, 15.0 K short of the 60 °C that it may have in use.'
		);
		expect(say(mild, 'customer')).toContain('with room to spare');
	});

	it('never goes dark, whatever happens', () => {
		for (const verdict of ['rides-it-out', 'runs-close', 'cuts-out'] as const) {
			const both = `${say({ ...tooHot, verdict })} ${say({ ...tooHot, verdict }, 'customer')}`;
			expect(both).not.toMatch(/\bdark\b|cut.?off|comes back/);
		}
	});
});
