import {
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import { id, json, moment, optionalReference, reference, text, whole } from './base';

export class AuditEntry extends Model<InferAttributes<AuditEntry>, InferCreationAttributes<AuditEntry>> {
	declare id: CreationOptional<number>;
	declare workshopId: number;
	declare sequence: number;
	declare at: Date;
	declare personId: number | null;
	declare action: string;
	declare subjectType: string;
	declare subjectId: number;
	declare detail: Record<string, unknown>;
	declare previousHash: string;
	declare hash: string;
}

export function initAuditEntry(sequelize: Sequelize): void {
	AuditEntry.init(
		{
			id: id,
			workshopId: reference,
			sequence: whole,
			at: moment,
			personId: optionalReference,
			action: text,
			subjectType: text,
			subjectId: reference,
			detail: json,
			previousHash: text,
			hash: text
		},
		{ sequelize, tableName: 'audit_entries', timestamps: false, modelName: 'AuditEntry' }
	);
}
