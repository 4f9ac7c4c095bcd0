import { batteryInputSchema } from '../../src/lib/schemas/batteries';
import { newJobSchema, type NewJob } from '../../src/lib/schemas/jobs';
import { placeInputSchema } from '../../src/lib/schemas/places';

/** Invented records, whole and in order, for tests to change one thing of. */
export const BATTERY = batteryInputSchema.parse({
	...{ maker: 'Emberlow', model: 'Slab 100', chemistry: 'lithium-iron-phosphate', capacityAh: 100 },
	...{ lengthMm: 310, widthMm: 172, heightMm: 220, massKg: 12.4, internalResistanceMohm: 8, maxChargeA: 50 },
	...{ sensor: 'cells', chargeCutC: 60, chargeResetC: 50, dischargeCutC: 80, dischargeResetC: 57 },
	...{ cutDelayS: 5, autoReset: true, underBonnet: 'conditional' },
	underBonnetWords: 'Not above 75 °C at the case.',
	dataSheet: 'Invented data sheet, page 3'
});

/** One that nothing switches off. */
export const AGM_BATTERY = batteryInputSchema.parse({
	...{ maker: 'Emberlow', model: 'Mat 95', chemistry: 'lead-acid-agm', capacityAh: 95 },
	...{ lengthMm: 353, widthMm: 175, heightMm: 190, massKg: 27, internalResistanceMohm: 5, maxChargeA: 25 },
	...{ highestChargeC: 50, highestUseC: 60, ratedLifeYears: 6, compensatesCharge: false },
	underBonnet: 'silent'
});

export const PLACE = placeInputSchema.parse({
	...{ name: 'Salt Lake', region: 'North', latitudeDeg: -28, longitudeDeg: 137, altitudeM: 20 },
	...{ climateZone: 'BWh', hotDayMaxC: 44.5, dailyRangeK: 16, sunPeakWPerM2: 1050 },
	source: 'Invented for this test'
});

export function newJob(changes: Partial<NewJob> = {}): NewJob {
	return newJobSchema.parse({
		...{ customerName: 'Ana Quillfeather', make: 'Farrow', model: 'Drover', modelYear: 2019 },
		...{ engineLayout: 'inline', massKg: 2900, dragAreaM2: 1.2, towMassKg: 1500, towDragAreaM2: 0.6 },
		...changes
	});
}
