import "server-only";
import type { InferAttributes, InferCreationAttributes } from "sequelize";
import { DataTypes, Model } from "sequelize";
import type { RefinableField } from "@/lib/domain/refined";
import { define } from "./define";

export class ThermalFitRow extends Model<
  InferAttributes<ThermalFitRow>,
  InferCreationAttributes<ThermalFitRow>
> {
  declare machineId: string;
  declare axis: string;
  declare field: RefinableField;
  declare catalogKPerW: number;
  declare valueKPerW: number;
  declare lowKPerW: number;
  declare highKPerW: number;
  declare readings: number;
  declare fittedAt: Date;
}

const kPerW = (field: string) => ({ type: DataTypes.DOUBLE, allowNull: false, field });

define(
  ThermalFitRow,
  { name: "ThermalFitRow", table: "thermal_fits" },
  {
    machineId: { type: DataTypes.UUID, primaryKey: true, allowNull: false },
    axis: { type: DataTypes.TEXT, primaryKey: true, allowNull: false },
    field: { type: DataTypes.TEXT, primaryKey: true, allowNull: false },
    catalogKPerW: kPerW("catalog_k_per_w"),
    valueKPerW: kPerW("value_k_per_w"),
    lowKPerW: kPerW("low_k_per_w"),
    highKPerW: kPerW("high_k_per_w"),
    readings: { type: DataTypes.INTEGER, allowNull: false },
    fittedAt: { type: DataTypes.DATE, allowNull: false },
  },
);
