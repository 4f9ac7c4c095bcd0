import {
	DataTypes,
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import { moment, reference, writtenOnce } from './base';

export class SignInLink extends Model<InferAttributes<SignInLink>, InferCreationAttributes<SignInLink>> {
	declare tokenHash: string;
	declare personId: number;
	declare expiresAt: Date;
	declare createdAt: CreationOptional<Date>;
}

export function initSignInLink(sequelize: Sequelize): void {
	SignInLink.init(
		{
			tokenHash: { type: DataTypes.CHAR(64), primaryKey: true },
			personId: reference,
			expiresAt: moment,
			createdAt: moment
		},
		{ sequelize, tableName: 'sign_in_links', ...writtenOnce, modelName: 'SignInLink' }
	);
}
