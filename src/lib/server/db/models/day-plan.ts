import {
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import type { PlanLeg } from '$lib/schemas/day-plans';
import { edited, id, json, moment, number, optionalReference, reference, text, whole } from './base';

export class DayPlan extends Model<InferAttributes<DayPlan>, InferCreationAttributes<DayPlan>> {
	declare id: CreationOptional<number>;
	declare workshopId: number;
	declare jobId: CreationOptional<number | null>;
	declare name: string;
	declare startHour: number;
	declare startSoc: number;
	declare chargerMaxA: number;
	declare legs: PlanLeg[];
	declare version: CreationOptional<number>;
	declare createdAt: CreationOptional<Date>;
	declare updatedAt: CreationOptional<Date>;
}

export function initDayPlan(sequelize: Sequelize): void {
	DayPlan.init(
		{
			id: id,
			workshopId: reference,
			jobId: optionalReference,
			name: text,
			startHour: number,
			startSoc: number,
			chargerMaxA: number,
			legs: json,
			version: { ...whole, defaultValue: 0 },
			createdAt: moment,
			updatedAt: moment
		},
		{ sequelize, tableName: 'day_plans', ...edited, modelName: 'DayPlan' }
	);
}
