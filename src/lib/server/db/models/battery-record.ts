import {
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import type { Chemistry, Sensor, UnderBonnetWord } from '$lib/schemas/batteries';
import { edited, flag, id, moment, number, reference, text, textOrEmpty, whole } from './base';

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
	declare sensor: Sensor;
	declare chargeCutC: number;
	declare chargeResetC: number;
	declare dischargeCutC: number;
	declare dischargeResetC: number;
	declare cutDelayS: number;
	declare autoReset: boolean;
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
			sensor: text,
			chargeCutC: number,
			chargeResetC: number,
			dischargeCutC: number,
			dischargeResetC: number,
			cutDelayS: number,
			autoReset: flag,
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
