import {
	DataTypes,
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import { moment, optionalMoment, reference } from './base';

export class Session extends Model<InferAttributes<Session>, InferCreationAttributes<Session>> {
	declare id: string;
	declare personId: number;
	declare createdAt: Date;
	declare lastSeenAt: Date;
	declare revokedAt: CreationOptional<Date | null>;
}

export function initSession(sequelize: Sequelize): void {
	Session.init(
		{
			id: { type: DataTypes.CHAR(64), primaryKey: true },
			personId: reference,
			createdAt: moment,
			lastSeenAt: moment,
			revokedAt: optionalMoment
		},
		{ sequelize, tableName: 'sessions', timestamps: false, modelName: 'Session' }
	);
}
