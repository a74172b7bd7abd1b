import "server-only";
import { ThermalFitRow } from "@/models/thermal-fits";
import type { Tx } from "@/lib/services/kernel/context";
import { machineHeat } from "./measured-heat";

/** Keeps what the temperatures measured on a machine make of its motors' thermal data, in place of what was kept. */
export async function refineThermal({ transaction, now }: Tx, machineId: string): Promise<void> {
  const { fits } = await machineHeat(machineId, transaction);
  await ThermalFitRow.destroy({ where: { machineId }, transaction });
  const rows = fits.flatMap(({ axis, field, catalog, readings, fit }) =>
    fit.ok
      ? [
          {
            machineId,
            axis,
            field,
            catalogKPerW: catalog,
            valueKPerW: fit.value,
            lowKPerW: fit.low,
            highKPerW: fit.high,
            readings,
            fittedAt: now,
          },
        ]
      : [],
  );
  if (rows.length > 0) await ThermalFitRow.bulkCreate(rows, { transaction });
}
