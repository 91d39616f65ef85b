/** The groups of controls beside the page. */
import type { ReactNode } from 'react';
import { PROJECTION_NAMES, PROJECTIONS, type ProjectionName } from '../../../kernel/cartography/projections';
import type { SliceSettings } from '../address';
import { LAYERS, PAPERS, type Layer, type Paper } from '../choices';

export interface Choice {
  readonly code: string;
  readonly name: string;
}

interface Props {
  readonly settings: SliceSettings;
  readonly change: (part: Partial<SliceSettings>) => void;
}

const LAYER_NAMES: Record<Layer, string> = {
  graticule: 'Graticule',
  coasts: 'Present coast, for location only',
  names: 'Block names',
  velocity: 'Velocity',
  path: 'Drift path',
  ellipse: '95 % ellipse',
};

function Group({ title, children }: { readonly title: string; readonly children: ReactNode }) {
  return (
    <fieldset>
      <legend className="t-head border-frame w-full border-b pb-1">{title}</legend>
      {children}
    </fieldset>
  );
}

function Line({ label, children }: { readonly label: string; readonly children: ReactNode }) {
  return (
    <label className="border-rule t-body flex min-h-8 items-center justify-between gap-3 border-b">
      <span className="text-ink-2">{label}</span>
      {children}
    </label>
  );
}

const quiet = 'min-h-7 max-w-44 bg-transparent text-right t-value';

interface NumberProps {
  readonly value: number | null;
  readonly least: number;
  readonly most: number;
  readonly step?: number;
  readonly name: string;
  readonly onChange: (value: number | null) => void;
}

function NumberInput({ value, least, most, step = 1, name, onChange }: NumberProps) {
  const take = (text: string): void => {
    const read = Number(text);
    onChange(text === '' || !Number.isFinite(read) ? null : Math.min(most, Math.max(least, read)));
  };
  return (
    <input
      className={`${quiet} tabular w-24`}
      type="number"
      name={name}
      value={value ?? ''}
      min={least}
      max={most}
      step={step}
      onChange={(e) => take(e.target.value)}
    />
  );
}

export function PageControls({ settings, change }: Props) {
  return (
    <Group title="Page">
      <Line label="Paper">
        <select
          className={quiet}
          value={settings.paper}
          onChange={(e) => change({ paper: e.target.value as Paper })}
        >
          {Object.keys(PAPERS).map((paper) => (
            <option key={paper} value={paper}>
              {paper.toUpperCase()}
            </option>
          ))}
        </select>
      </Line>
      <Line label="Held">
        <select
          className={quiet}
          value={settings.orientation}
          onChange={(e) => change({ orientation: e.target.value as SliceSettings['orientation'] })}
        >
          <option value="landscape">landscape</option>
          <option value="portrait">portrait</option>
        </select>
      </Line>
    </Group>
  );
}

export function MapControls({
  settings,
  change,
  frames,
  oldest_ma,
}: Props & { readonly frames: readonly Choice[]; readonly oldest_ma: number }) {
  const kind = PROJECTIONS[settings.projection];
  return (
    <Group title="Map">
      <Line label="Age, Ma">
        <NumberInput
          name="age_ma"
          value={settings.age_ma}
          least={0}
          most={Math.max(1, oldest_ma)}
          step={0.1}
          onChange={(age) => change({ age_ma: age ?? 0 })}
        />
      </Line>
      <Line label="Held still">
        <select
          className={quiet}
          value={settings.relative_to}
          onChange={(e) => change({ relative_to: e.target.value })}
        >
          {frames.map(({ code, name }) => (
            <option key={code} value={code}>
              {name}
            </option>
          ))}
        </select>
      </Line>
      <Line label="Projection">
        <select
          className={quiet}
          value={settings.projection}
          onChange={(e) => change({ projection: e.target.value as ProjectionName, reach_deg: null })}
        >
          {PROJECTION_NAMES.map((name) => (
            <option key={name} value={name}>
              {PROJECTIONS[name].label}
            </option>
          ))}
        </select>
      </Line>
      {kind.centre !== 'equator' && (
        <Line label={kind.centre === 'pole' ? 'Pole, °N' : 'Centre, °N'}>
          <NumberInput
            name="centre_lat"
            value={settings.centre_lat}
            least={-90}
            most={90}
            onChange={(lat) => change({ centre_lat: lat ?? 0 })}
          />
        </Line>
      )}
      <Line label="Centre, °E">
        <NumberInput
          name="centre_lon"
          value={settings.centre_lon}
          least={-180}
          most={180}
          onChange={(lon) => change({ centre_lon: lon ?? 0 })}
        />
      </Line>
      {kind.reach && (
        <Line label={`Reach, ° (${kind.reach.usual} unless given)`}>
          <NumberInput
            name="reach_deg"
            value={settings.reach_deg}
            least={5}
            most={kind.reach.most}
            onChange={(reach_deg) => change({ reach_deg })}
          />
        </Line>
      )}
    </Group>
  );
}

export function LayerControls({ settings, change }: Props) {
  const toggle = (layer: Layer, on: boolean): void =>
    change({ layers: LAYERS.filter((l) => (l === layer ? on : settings.layers.includes(l))) });
  return (
    <Group title="Drawn">
      {LAYERS.map((layer) => (
        <label key={layer} className="border-rule t-body flex min-h-8 items-center gap-2.5 border-b">
          <input
            type="checkbox"
            className="size-4 accent-(--ink)"
            checked={settings.layers.includes(layer)}
            onChange={(e) => toggle(layer, e.target.checked)}
          />
          {LAYER_NAMES[layer]}
        </label>
      ))}
    </Group>
  );
}

export function PathControls({ settings, change, blocks }: Props & { readonly blocks: readonly Choice[] }) {
  return (
    <Group title="Drift path">
      <Line label="Block">
        <select
          className={quiet}
          value={settings.path_block}
          onChange={(e) => change({ path_block: e.target.value })}
        >
          <option value="">none</option>
          {blocks.map(({ code, name }) => (
            <option key={code} value={code}>
              {name}
            </option>
          ))}
        </select>
      </Line>
      {settings.path_block !== '' && (
        <>
          <Line label="Point today, °N">
            <NumberInput
              name="path_lat"
              value={settings.path_lat}
              least={-90}
              most={90}
              step={0.1}
              onChange={(path_lat) => change({ path_lat })}
            />
          </Line>
          <Line label="Point today, °E">
            <NumberInput
              name="path_lon"
              value={settings.path_lon}
              least={-180}
              most={180}
              step={0.1}
              onChange={(path_lon) => change({ path_lon })}
            />
          </Line>
          <Line label="Step, Myr">
            <NumberInput
              name="path_step_ma"
              value={settings.path_step_ma}
              least={0.1}
              most={500}
              step={0.1}
              onChange={(step) => change({ path_step_ma: step || 10 })}
            />
          </Line>
        </>
      )}
    </Group>
  );
}

export function CaptionControls({ settings, change }: Props) {
  return (
    <Group title="Caption">
      <label className="field mt-2">
        <span className="sr-only">Title</span>
        <input
          className="input"
          value={settings.title}
          placeholder="Title, unless the project's"
          onChange={(e) => change({ title: e.target.value })}
        />
      </label>
      <label className="field mt-2">
        <span className="sr-only">Caption</span>
        <textarea
          className="input font-serif"
          rows={4}
          value={settings.caption}
          placeholder="What the map shows"
          onChange={(e) => change({ caption: e.target.value })}
        />
      </label>
      <p className="hint">
        Frame, projection, version, sources and the caution line are added and cannot be left out.
      </p>
    </Group>
  );
}
