import {
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import type { PlaceInput, WeatherFileMark } from '$lib/schemas/places';
import {
	edited,
	id,
	moment,
	number,
	optionalJson,
	optionalText,
	reference,
	text,
	textOrEmpty,
	whole
} from './base';

/** What a weather file may change of a place, and what it came from. */
export type WeatherFields = Pick<
	PlaceInput,
	| ('latitudeDeg' | 'longitudeDeg' | 'altitudeM')
	| ('hotDayMaxC' | 'dailyRangeK' | 'sunPeakWPerM2' | 'source')
	| ('monthlyMaxC' | 'monthlySpreadK' | 'monthsSource')
> & { weatherFile: WeatherFileMark | null };

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
	declare monthlyMaxC: CreationOptional<number[] | null>;
	declare monthlySpreadK: CreationOptional<number[] | null>;
	declare monthsSource: CreationOptional<string | null>;
	declare weatherFile: CreationOptional<WeatherFileMark | null>;
	/** What the climate class is computed from, where somebody gave it. */
	declare monthlyMeanC: CreationOptional<number[] | null>;
	declare monthlyRainMm: CreationOptional<number[] | null>;
	declare classSource: CreationOptional<string | null>;
	declare computedZone: CreationOptional<string | null>;
	/** Of the shop's own zones; 0 where none fits. */
	declare ownZoneId: CreationOptional<number>;
	/** As it stood before its weather file was taken; null once somebody changed it again. */
	declare beforeWeather: CreationOptional<WeatherFields | null>;
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
			monthlyMaxC: optionalJson,
			monthlySpreadK: optionalJson,
			monthsSource: optionalText,
			weatherFile: optionalJson,
			beforeWeather: optionalJson,
			monthlyMeanC: optionalJson,
			monthlyRainMm: optionalJson,
			classSource: optionalText,
			computedZone: optionalText,
			ownZoneId: { ...reference, defaultValue: 0 },
			version: { ...whole, defaultValue: 0 },
			createdAt: moment,
			updatedAt: moment
		},
		{ sequelize, tableName: 'places', ...edited, modelName: 'Place' }
	);
}
