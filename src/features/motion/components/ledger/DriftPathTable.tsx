/** The drift path as a table: its point, span, step and frame are set here; rows' ages stand apart from steps. */
import { useMemo } from 'react';
import type { DriftPoint } from '../../../../kernel/rotations';
import { coordinates, ellipse, number, shortAge } from '../../format';
import { driftPath } from '../../scene/tolerant';
import { findSceneBlock } from '../../scene/scene';
import { holdStill, select, setAge, setPathSpan } from '../../store/actions';
import { useBench, useWorkbench } from '../bench';
import { useNames } from '../use-names';
import { NumberField } from './NumberField';

interface Props {
  readonly slug: string;
  readonly version: 'draft' | number;
}

export function DriftPathTable({ slug, version }: Props) {
  const { scene, model, point } = useBench();
  const heldStill = useWorkbench((state) => state.heldStill);
  const span = useWorkbench((state) => state.path);
  const older = span.older_ma ?? model.oldest_ma;
  const younger = Math.min(span.younger_ma ?? 0, older);
  const rows = useMemo(
    () =>
      point && older > 0
        ? driftPath(model, {
            ...point,
            older_ma: older,
            younger_ma: younger,
            step_ma: span.step_ma,
            relative_to: heldStill,
          })
        : [],
    [model, point, older, younger, span.step_ma, heldStill],
  );
  if (!point) {
    return (
      <p className="t-body text-ink-2 grow px-3.5 py-3">
        Click a block on the globe, or pick one with <kbd>/</kbd>, to follow a point of it.
      </p>
    );
  }
  const query = new URLSearchParams({
    version: String(version),
    block: point.block,
    lat: String(point.lat),
    lon: String(point.lon),
    older_ma: String(older),
    younger_ma: String(younger),
    step_ma: String(span.step_ma),
    relative_to: heldStill,
  });
  const file = (format: string): string =>
    `/api/projects/${encodeURIComponent(slug)}/drift-path?${query}&format=${format}`;
  return (
    <>
      <PathForm key={`${point.block} ${point.lat} ${point.lon}`} older={older} younger={younger} />
      <div className="min-h-0 grow overflow-auto" tabIndex={0} role="region" aria-label="Drift path">
        <PathRows rows={rows} />
      </div>
      <div className="border-frame t-body flex min-h-8 flex-wrap items-center gap-x-4 border-t px-3.5 py-1">
        <p className="text-ink-2 grow">
          {point.subject} from {coordinates(point.lat, point.lon)} today, in{' '}
          {findSceneBlock(scene, heldStill)?.name ?? heldStill}. Bars: ages of rows.
        </p>
        <a className="button min-h-6 px-2" href={file('geojson')} download>
          GeoJSON
        </a>
        <a className="button min-h-6 px-2" href={file('csv')} download>
          CSV
        </a>
      </div>
    </>
  );
}

/** Typed values act when they are kept, by Enter or by leaving the field. */
function PathForm({ older, younger }: { readonly older: number; readonly younger: number }) {
  const { store, scene, model, point } = useBench();
  const heldStill = useWorkbench((state) => state.heldStill);
  const step = useWorkbench((state) => state.path.step_ma);
  const blocks = scene.blocks.filter((block) => block.outlines.length > 0);
  const place = (lat: number, lon: number): void => select(store, point!.block, { lat, lon });
  return (
    <form
      className="border-rule t-body flex flex-wrap items-end gap-x-3 gap-y-1 border-b px-3.5 py-1.5"
      onSubmit={(event) => event.preventDefault()}
    >
      <label>
        <span className="t-label text-ink-2 block">Block</span>
        <select
          className="border-edge bg-sheet h-7 rounded-[3px] border px-1"
          value={point!.block}
          onChange={(event) => select(store, event.target.value)}
        >
          {blocks.map(({ code, name }) => (
            <option key={code} value={code}>
              {name}
            </option>
          ))}
        </select>
      </label>
      <NumberField
        label="Today, °N"
        value={point!.lat}
        least={-90}
        most={90}
        onKeep={(lat) => place(lat, point!.lon)}
      />
      <NumberField
        label="°E"
        value={point!.lon}
        least={-360}
        most={360}
        onKeep={(lon) => place(point!.lat, lon)}
      />
      <NumberField
        label="From, Ma"
        value={older}
        least={0}
        most={model.oldest_ma}
        onKeep={(age) => setPathSpan(store, { older_ma: age })}
      />
      <NumberField
        label="to, Ma"
        value={younger}
        least={0}
        most={older}
        onKeep={(age) => setPathSpan(store, { younger_ma: age })}
      />
      <NumberField
        label="Step, Myr"
        value={step}
        least={0.1}
        most={500}
        onKeep={(by) => setPathSpan(store, { step_ma: by })}
      />
      <label>
        <span className="t-label text-ink-2 block">In the frame of</span>
        <select
          className="border-edge bg-sheet h-7 rounded-[3px] border px-1"
          value={heldStill}
          onChange={(event) => holdStill(store, event.target.value)}
        >
          {scene.blocks.map(({ code, name }) => (
            <option key={code} value={code}>
              {name}
            </option>
          ))}
        </select>
      </label>
    </form>
  );
}

function PathRows({ rows }: { readonly rows: readonly DriftPoint[] }) {
  const { store, scene } = useBench();
  const age = useWorkbench((state) => state.age);
  const nameOf = useNames();
  const head = [['Age', 'Ma'], ['Position', ''], ['Speed', 'mm/yr'], ['Azimuth', '°'], ['95 %', 'km']] as const; // prettier-ignore
  return (
    <table className="t-table w-full border-collapse">
      <thead className="bg-paper sticky top-0">
        <tr className="border-frame border-b [&>th]:px-2 [&>th]:py-1 [&>th]:font-medium">
          {head.map(([name, unit], i) => (
            <th key={name} scope="col" className={i === 1 ? 'text-left' : 'text-right'}>
              {name} <span className="text-ink-2 block font-normal">{unit || '\u00a0'}</span>
            </th>
          ))}
        </tr>
      </thead>
      <tbody>
        {rows.map((row, i) => (
          <tr
            key={i}
            className={`border-rule h-[21px] border-b [&>td]:px-2 ${Math.abs(row.age_ma - age) < 0.05 ? 'bg-ochre-wash' : ''}`}
          >
            <td className="tabular text-right">
              <button
                className={`hover:underline ${row.at_row ? 'font-semibold' : ''}`}
                onClick={() => setAge(store, row.age_ma, scene.oldest)}
                title={row.at_row ? 'age of a row' : 'between rows'}
              >
                {row.at_row && <span aria-hidden="true">▏</span>}
                {shortAge(row.age_ma)}
              </button>
            </td>
            <td>
              {row.lat === null || row.lon === null ? (
                <span className="text-ink-2">{row.status === 'placed' ? '' : nameOf(row.status)}</span>
              ) : (
                coordinates(row.lat, row.lon)
              )}
            </td>
            <td className="tabular text-right">
              {row.speed_mm_yr === null ? '' : number(row.speed_mm_yr, 1)}
            </td>
            <td className="tabular text-right">
              {row.azimuth_deg === null ? '' : number(row.azimuth_deg).padStart(3, '0')}
            </td>
            <td className="tabular text-right whitespace-nowrap">
              {row.ellipse_95
                ? `${row.ellipse_95.at_least ? 'at least ' : ''}${ellipse(row.ellipse_95.semi_major_km, row.ellipse_95.semi_minor_km).replace(/ km.*/, '')}`
                : 'none'}
            </td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}
