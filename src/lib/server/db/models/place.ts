import {
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import { edited, id, moment, number, reference, text, textOrEmpty, whole } from './base';

export class Place extends Model<InferAttributes<Place>, InferCreationAttributes<Place>> {
	declare id: CreationOptional<number>;
	declare workshopId: number;
	declare name: string;
	declare region: CreationOptional<string>;
	declare latitudeDeg: number;
	declare longitudeDeg: number;
	declare altitudeM: number;
	declare climateZone: string;
	declare hotDayMaxC: number;
	declare dailyRangeK: number;
	declare sunPeakWPerM2: number;
	declare source: string;
	declare version: CreationOptional<number>;
	declare createdAt: CreationOptional<Date>;
	declare updatedAt: CreationOptional<Date>;
}

export function initPlace(sequelize: Sequelize): void {
	Place.init(
		{
			id: id,
			workshopId: reference,
			name: text,
			region: textOrEmpty,
			latitudeDeg: number,
			longitudeDeg: number,
			altitudeM: number,
			climateZone: text,
			hotDayMaxC: number,
			dailyRangeK: number,
			sunPeakWPerM2: { ...number, field: 'sun_peak_w_per_m2' },
			source: text,
			version: { ...whole, defaultValue: 0 },
			createdAt: moment,
			updatedAt: moment
		},
		{ sequelize, tableName: 'places', ...edited, modelName: 'Place' }
	);
}
