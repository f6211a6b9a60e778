import type { CreationAttributes, Transaction } from "sequelize";
import { FluidSample } from "../associations";

interface Options {
  transaction?: Transaction;
  lock?: boolean;
}

export async function findFluidSample(
  id: string,
  options: Options = {},
): Promise<FluidSample | null> {
  return FluidSample.findByPk(id, options);
}

/** The samples of one reservoir, newest first. */
export async function listFluidSamplesOfReservoir(reservoirId: string): Promise<FluidSample[]> {
  return FluidSample.findAll({
    where: { reservoirId },
    order: [
      ["sampledOn", "DESC"],
      ["name", "ASC"],
    ],
    limit: 200,
  });
}

export async function createFluidSampleRow(
  values: CreationAttributes<FluidSample>,
  options: { transaction: Transaction },
): Promise<FluidSample> {
  return FluidSample.create(values, options);
}
