import type { Block, Rotation } from '~/features/ledger/contract';
import type { Ledger } from '~/features/ledger/read';
import { compileModel } from '~/kernel/rotations/compile';
import type { BlockInput, Model, RotationInput } from '~/kernel/rotations/types';

const compiled = new WeakMap<Ledger['rotations'], Model>();

/** The compiled model of a state: compiled once for as long as the state stays loaded. */
export function modelOf({ blocks, rotations }: Pick<Ledger, 'blocks' | 'rotations'>): Model {
  const found = compiled.get(rotations) ?? compileModel(blocks.map(blockInput), rotations.map(rotationInput));
  compiled.set(rotations, found);
  return found;
}

/** Only what the kernel reads: the model travels to the browser as it is. */
const blockInput = ({ code, kind, appears_ma, disappears_ma }: Block): BlockInput => ({
  code,
  kind,
  appears_ma,
  disappears_ma,
});

const rotationInput = (row: Rotation): RotationInput => ({
  id: row.id,
  block: row.block,
  relative_to: row.relative_to,
  age_ma: row.age_ma,
  pole_lat: row.pole_lat,
  pole_lon: row.pole_lon,
  angle_deg: row.angle_deg,
  evidence: row.evidence,
  covariance: row.covariance,
  cov_dof: row.cov_dof,
  age_two_sigma_ma: row.age_two_sigma_ma,
  source: row.source,
});
