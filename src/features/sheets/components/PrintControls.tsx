/** The groups of controls beside the page. */
import type { ReactNode } from 'react';
import { PROJECTION_NAMES, PROJECTIONS, type ProjectionName } from '../../../kernel/cartography/projections';
import type { SliceSettings } from '../address';
import type { KnownPoint } from '../known-points';
import { pointWords } from '../point-words';
import { LAYERS, PAPERS, type Layer, type Paper } from '../choices';
import { NumberField } from './NumberField';

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

export function VersionControl({
  version,
  versions,
  choose,
}: {
  readonly version: string;
  readonly versions: readonly Choice[];
  readonly choose: (version: string) => void;
}) {
  return (
    <Group title="State">
      <Line label="Version">
        <select className={quiet} value={version} onChange={(e) => choose(e.target.value)}>
          {versions.map(({ code, name }) => (
            <option key={code} value={code}>
              {name}
            </option>
          ))}
        </select>
      </Line>
    </Group>
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
      <NumberField
        label="Age, Ma"
        name="age_ma"
        what="an age"
        unit="Ma"
        value={settings.age_ma}
        least={0}
        most={Math.max(1, oldest_ma)}

        onChange={(age_ma) => age_ma !== null && change({ age_ma })}
      />
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
        <NumberField
          label={kind.centre === 'pole' ? 'Pole, °N' : 'Centre, °N'}
          name="centre_lat"
          what="a latitude"
          unit="°"
          value={settings.centre_lat}
          least={-90}
          most={90}

          onChange={(centre_lat) => centre_lat !== null && change({ centre_lat })}
        />
      )}
      <NumberField
        label="Centre, °E"
        name="centre_lon"
        what="a longitude"
        unit="°"
        value={settings.centre_lon}
        least={-360}
        most={360}

        onChange={(centre_lon) => centre_lon !== null && change({ centre_lon })}
      />
      {kind.reach && (
        <NumberField
          label={`Reach, ° (${kind.reach.usual} unless given)`}
          name="reach_deg"
          what="a reach"
          unit="°"
          value={settings.reach_deg}
          least={5}
          most={kind.reach.most}
          optional
          onChange={(reach_deg) => change({ reach_deg })}
        />
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

interface PathProps extends Props {
  readonly blocks: readonly Choice[];
  readonly points: Readonly<Record<string, KnownPoint>>;
  /** As the page was opened. */
  readonly opened: SliceSettings;
}

export function PathControls({ settings, change, blocks, points, opened }: PathProps) {
  const choose = (path_block: string): void => {
    const point = points[path_block];
    change({ path_block, path_lat: point?.lat ?? null, path_lon: point?.lon ?? null });
  };
  return (
    <Group title="Drift path">
      <Line label="Block">
        <select className={quiet} value={settings.path_block} onChange={(e) => choose(e.target.value)}>
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
          <p className="hint">{pointWords(settings, opened, points[settings.path_block])}</p>
          <NumberField
            label="Point today, °N"
            name="path_lat"
            what="a latitude"
            unit="°"
            value={settings.path_lat}
            least={-90}
            most={90}
            optional
            onChange={(path_lat) => change({ path_lat })}
          />
          <NumberField
            label="Point today, °E"
            name="path_lon"
            what="a longitude"
            unit="°"
            value={settings.path_lon}
            least={-360}
            most={360}
            optional
            onChange={(path_lon) => change({ path_lon })}
          />
          <NumberField
            label="Step, Myr"
            name="path_step_ma"
            what="a step"
            unit="Myr"
            value={settings.path_step_ma}
            least={0.1}
            most={500}

            onChange={(path_step_ma) => path_step_ma !== null && change({ path_step_ma })}
          />
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
