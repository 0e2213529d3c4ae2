import { DataTypes, Model } from 'sequelize';
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize';

/** An event already taken in from the payment service. */
export class WebhookEventModel extends Model<
  InferAttributes<WebhookEventModel>,
  InferCreationAttributes<WebhookEventModel>
> {
  declare id: string;
  declare kind: string;
  declare createdAt: CreationOptional<Date>;

  static define(sequelize: Sequelize): void {
    WebhookEventModel.init(
      {
        id: { type: DataTypes.STRING(80), primaryKey: true, allowNull: false },
        kind: { type: DataTypes.STRING, allowNull: false },
        createdAt: { type: DataTypes.DATE, allowNull: false },
      },
      { sequelize, modelName: 'WebhookEvent', tableName: 'webhook_events', updatedAt: false },
    );
  }
}
