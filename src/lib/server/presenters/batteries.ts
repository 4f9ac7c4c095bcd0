import type { BatteryView } from '$lib/schemas/batteries';
import type { BatteryRecord } from '../db/models';

export function presentBattery(battery: BatteryRecord): BatteryView {
	const { id, version, maker, model, chemistry, capacityAh, lengthMm, widthMm, heightMm, massKg } = battery;
	const { internalResistanceMohm, maxChargeA, sensor, cutDelayS, autoReset } = battery;
	const { chargeCutC, chargeResetC, dischargeCutC, dischargeResetC } = battery;
	const { highestChargeC, highestUseC, ratedLifeYears, compensatesCharge } = battery;
	const { underBonnet, underBonnetWords, dataSheet } = battery;
	return {
		...{ id, version, maker, model, chemistry, capacityAh, lengthMm, widthMm, heightMm, massKg },
		...{ internalResistanceMohm, maxChargeA, sensor, cutDelayS, autoReset },
		...{ chargeCutC, chargeResetC, dischargeCutC, dischargeResetC },
		...{ highestChargeC, highestUseC, ratedLifeYears, compensatesCharge },
		...{ underBonnet, underBonnetWords, dataSheet }
	};
}
