import {
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type NonAttribute,
	type Sequelize
} from 'sequelize';
import type { Chemistry } from '$lib/schemas/batteries';
import type { Verdict } from '$lib/schemas/verdicts';
import type { JobStage } from '$lib/schemas/jobs';
import type { BatteryRecord } from './battery-record';
import type { Customer } from './customer';
import type { Place } from './place';
import type { Vehicle } from './vehicle';
import {
	edited,
	id,
	moment,
	optionalJson,
	optionalNumber,
	optionalReference,
	optionalText,
	reference,
	text,
	textOrEmpty,
	whole
} from './base';

export class Job extends Model<InferAttributes<Job>, InferCreationAttributes<Job>> {
	declare id: CreationOptional<number>;
	declare workshopId: number;
	declare number: number;
	declare customerId: number;
	declare vehicleId: number;
	declare batteryRecordId: CreationOptional<number | null>;
	declare placeId: CreationOptional<number | null>;
	declare hotDayMaxC: CreationOptional<number | null>;
	declare dailyRangeK: CreationOptional<number | null>;
	declare sunPeakWPerM2: CreationOptional<number | null>;
	/** January to December; null for the workshop's usual. */
	declare daysOnRoad: CreationOptional<number[] | null>;
	declare stage: CreationOptional<JobStage>;
	declare verdict: CreationOptional<Verdict | null>;
	/** Of the battery that the verdict is about. */
	declare assessedChemistry: CreationOptional<Chemistry>;
	declare headroomK: CreationOptional<number | null>;
	declare note: CreationOptional<string>;
	declare createdBy: number;
	declare version: CreationOptional<number>;
	declare createdAt: CreationOptional<Date>;
	declare updatedAt: CreationOptional<Date>;
	declare customer?: NonAttribute<Customer>;
	declare vehicle?: NonAttribute<Vehicle>;
	declare batteryRecord?: NonAttribute<BatteryRecord | null>;
	declare place?: NonAttribute<Place | null>;
}

export function initJob(sequelize: Sequelize): void {
	Job.init(
		{
			id: id,
			workshopId: reference,
			number: whole,
			customerId: reference,
			vehicleId: reference,
			batteryRecordId: optionalReference,
			placeId: optionalReference,
			hotDayMaxC: optionalNumber,
			dailyRangeK: optionalNumber,
			sunPeakWPerM2: { ...optionalNumber, field: 'sun_peak_w_per_m2' },
			daysOnRoad: optionalJson,
			stage: { ...text, defaultValue: 'survey' },
			verdict: optionalText,
			assessedChemistry: { ...text, defaultValue: 'lithium-iron-phosphate' },
			headroomK: optionalNumber,
			note: textOrEmpty,
			createdBy: reference,
			version: { ...whole, defaultValue: 0 },
			createdAt: moment,
			updatedAt: moment
		},
		{ sequelize, tableName: 'jobs', ...edited, modelName: 'Job' }
	);
}
