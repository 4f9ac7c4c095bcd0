import {
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import type { FitInputs, FitState } from '$lib/schemas/fits';
import type { DoneCoefficientFit } from '$lib/thermal/fit';
import { flag, id, json, moment, optionalJson, optionalMoment, reference, text, textOrEmpty } from './base';

/** Coefficients fitted to traces. */
export class Fit extends Model<InferAttributes<Fit>, InferCreationAttributes<Fit>> {
	declare id: CreationOptional<number>;
	declare workshopId: number;
	declare name: string;
	declare state: FitState;
	/** Any of its traces was made up. */
	declare isSynthetic: boolean;
	declare inputs: FitInputs;
	declare bookId: number;
	declare engineVersion: string;
	declare result: CreationOptional<DoneCoefficientFit | null>;
	declare failure: CreationOptional<string>;
	declare madeBy: number;
	declare finishedAt: CreationOptional<Date | null>;
	declare createdAt: CreationOptional<Date>;
	declare updatedAt: CreationOptional<Date>;
}

export function initFit(sequelize: Sequelize): void {
	Fit.init(
		{
			id: id,
			workshopId: reference,
			name: text,
			state: text,
			isSynthetic: flag,
			inputs: json,
			bookId: reference,
			engineVersion: text,
			result: optionalJson,
			failure: textOrEmpty,
			madeBy: reference,
			finishedAt: optionalMoment,
			createdAt: moment,
			updatedAt: moment
		},
		{ sequelize, tableName: 'fits', timestamps: true, modelName: 'Fit' }
	);
}
