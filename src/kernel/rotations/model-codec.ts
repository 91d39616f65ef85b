/**
 * A compiled model as bytes, exact to the last bit: "DWM1", the length of a JSON heading (uint32), the heading
 * in UTF-8 padded with blanks to a multiple of 8, then float64 values, little-endian throughout. The heading is
 * the model without the numbers of its rows and stages. They follow block by block and leg by leg: for each row
 * age_ma, pole_lat, pole_lon, angle_deg, quaternion w x y z; then for each stage its axis x y z and its rate. A
 * stage starts at its younger row.
 */
import type { CompiledRow, Leg, Model, Stage } from './types';

const MAGIC = 'DWM1';
const PREFIX_BYTES = 8;

type BareRow = Omit<CompiledRow, 'age_ma' | 'pole_lat' | 'pole_lon' | 'angle_deg' | 'quaternion'>;
interface BareLeg {
  readonly relative_to: string;
  readonly rows: readonly BareRow[];
}
/** What stands beside the blocks goes along as it is. */
type Heading<Rest> = Rest & {
  readonly blocks: readonly (Omit<Model['blocks'][number], 'legs'> & { readonly legs: readonly BareLeg[] })[];
};

export function encodeModel<M extends Model>(model: M): Uint8Array<ArrayBuffer> {
  const numbers: number[] = [];
  const blocks = model.blocks.map(({ legs, ...block }) => ({
    ...block,
    legs: legs.map(({ relative_to, rows, stages }): BareLeg => {
      const bare = rows.map(({ age_ma, pole_lat, pole_lon, angle_deg, quaternion, ...row }) => {
        numbers.push(age_ma, pole_lat, pole_lon, angle_deg, ...quaternion);
        return row;
      });
      for (const { axis, rate } of stages) numbers.push(...axis, rate);
      return { relative_to, rows: bare };
    }),
  }));
  const text = new TextEncoder().encode(JSON.stringify({ ...model, blocks }));
  const start = Math.ceil((PREFIX_BYTES + text.length) / 8) * 8;
  const bytes = new Uint8Array(start + numbers.length * 8).fill(0x20, 0, start);
  const view = new DataView(bytes.buffer);
  bytes.set(new TextEncoder().encode(MAGIC));
  view.setUint32(4, start - PREFIX_BYTES, true);
  bytes.set(text, PREFIX_BYTES);
  numbers.forEach((value, i) => view.setFloat64(start + i * 8, value, true));
  return bytes;
}

/** @throws {RangeError} for bytes that are no such model. */
export function decodeModel<M extends Model = Model>(bytes: Uint8Array): M {
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  const magic = new TextDecoder().decode(bytes.subarray(0, 4));
  if (magic !== MAGIC) throw new RangeError(`a model starts with ${MAGIC}; read "${magic}"`);
  const start = PREFIX_BYTES + view.getUint32(4, true);
  const heading = JSON.parse(new TextDecoder().decode(bytes.subarray(PREFIX_BYTES, start))) as Heading<M>;
  let at = start;
  const take = (): number => {
    const value = view.getFloat64(at, true);
    at += 8;
    return value;
  };
  const blocks = heading.blocks.map(({ legs, ...block }) => ({
    ...block,
    legs: legs.map((leg) => readLeg(leg, take)),
  }));
  return { ...heading, blocks };
}

function readLeg({ relative_to, rows: bare }: BareLeg, take: () => number): Leg {
  const rows = bare.map((row): CompiledRow => {
    const [age_ma, pole_lat, pole_lon, angle_deg] = [take(), take(), take(), take()];
    return { ...row, age_ma, pole_lat, pole_lon, angle_deg, quaternion: [take(), take(), take(), take()] };
  });
  const stages = rows.slice(1).flatMap((older, i): Stage[] => {
    const younger = rows[i];
    if (!younger) return [];
    const axis = [take(), take(), take()] as const;
    const ages = { younger_ma: younger.age_ma, older_ma: older.age_ma };
    return [{ ...ages, start: younger.quaternion, axis, rate: take() }];
  });
  return { relative_to, younger_ma: rows[0]?.age_ma ?? 0, older_ma: rows.at(-1)?.age_ma ?? 0, rows, stages };
}
