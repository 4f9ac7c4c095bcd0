import {
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import type { Chemistry, Sensor, UnderBonnetWord } from '$lib/schemas/batteries';
import {
	edited,
	id,
	moment,
	number,
	optionalFlag,
	optionalNumber,
	optionalText,
	reference,
	text,
	textOrEmpty,
	whole
} from './base';

export class BatteryRecord extends Model<
	InferAttributes<BatteryRecord>,
	InferCreationAttributes<BatteryRecord>
> {
	declare id: CreationOptional<number>;
	declare workshopId: number;
	declare maker: string;
	declare model: string;
	declare chemistry: Chemistry;
	declare capacityAh: number;
	declare lengthMm: number;
	declare widthMm: number;
	declare heightMm: number;
	declare massKg: number;
	declare internalResistanceMohm: number;
	declare maxChargeA: number;
	/** What a BMS does; null for a battery without one. */
	declare sensor: CreationOptional<Sensor | null>;
	declare chargeCutC: CreationOptional<number | null>;
	declare chargeResetC: CreationOptional<number | null>;
	declare dischargeCutC: CreationOptional<number | null>;
	declare dischargeResetC: CreationOptional<number | null>;
	declare cutDelayS: CreationOptional<number | null>;
	declare autoReset: CreationOptional<boolean | null>;
	/** What a maker allows a battery that nothing switches off; null for one with a BMS. */
	declare highestChargeC: CreationOptional<number | null>;
	declare highestUseC: CreationOptional<number | null>;
	declare ratedLifeYears: CreationOptional<number | null>;
	declare compensatesCharge: CreationOptional<boolean | null>;
	declare underBonnet: UnderBonnetWord;
	declare underBonnetWords: CreationOptional<string>;
	declare dataSheet: CreationOptional<string>;
	declare version: CreationOptional<number>;
	declare createdAt: CreationOptional<Date>;
	declare updatedAt: CreationOptional<Date>;
}

export function initBatteryRecord(sequelize: Sequelize): void {
	BatteryRecord.init(
		{
			id: id,
			workshopId: reference,
			maker: text,
			model: text,
			chemistry: text,
			capacityAh: number,
			lengthMm: number,
			widthMm: number,
			heightMm: number,
			massKg: number,
			internalResistanceMohm: number,
			maxChargeA: number,
			sensor: optionalText,
			chargeCutC: optionalNumber,
			chargeResetC: optionalNumber,
			dischargeCutC: optionalNumber,
			dischargeResetC: optionalNumber,
			cutDelayS: optionalNumber,
			autoReset: optionalFlag,
			highestChargeC: optionalNumber,
			highestUseC: optionalNumber,
			ratedLifeYears: optionalNumber,
			compensatesCharge: optionalFlag,
			underBonnet: text,
			underBonnetWords: textOrEmpty,
			dataSheet: textOrEmpty,
			version: { ...whole, defaultValue: 0 },
			createdAt: moment,
			updatedAt: moment
		},
		{ sequelize, tableName: 'battery_records', ...edited, modelName: 'BatteryRecord' }
	);
}
