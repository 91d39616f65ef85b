/** What the print page opens with: what its link says and can be used, else the usual; and what could not be used. */
import { usualSettings, type SliceSettings } from './address';
import { sliceQuery, type SliceQuery } from './contract';

interface Usual {
  readonly age_ma: number;
  readonly frame: string;
  /** Codes of the blocks and frames of the state. */
  readonly codes: readonly string[];
}

export interface OpenedLink {
  readonly settings: SliceSettings;
  /** Values of the link that were left out, each with why. */
  readonly refused: readonly string[];
}

export function settingsFromLink(link: Readonly<Record<string, string>>, usual: Usual): OpenedLink {
  const { used, refused } = readLink({ age_ma: String(usual.age_ma), ...link }, usual);
  const { age_ma, relative_to, projection, centre_lat, centre_lon, reach_deg, layers, paper, orientation } =
    used;
  const settings: SliceSettings = {
    ...usualSettings(usual.frame),
    age_ma,
    projection,
    centre_lat,
    centre_lon,
    reach_deg: reach_deg ?? null,
    layers,
    paper,
    orientation,
    title: used.title ?? '',
    caption: used.caption,
    path_block: used.path_block ?? '',
    path_lat: used.path_lat ?? null,
    path_lon: used.path_lon ?? null,
    path_step_ma: used.path_step_ma,
    ...(relative_to === undefined ? {} : { relative_to }),
  };
  return { settings, refused };
}

function readLink(
  link: Readonly<Record<string, string>>,
  { age_ma, codes }: Usual,
): { used: SliceQuery; refused: string[] } {
  const problems = new Map<string, string>();
  for (const { path, message } of sliceQuery.safeParse(link).error?.issues ?? [])
    problems.set(String(path[0]), message);
  for (const name of ['relative_to', 'path_block']) {
    const code = link[name];
    if (code !== undefined && !codes.includes(code))
      problems.set(name, 'no such block or frame in this version');
  }
  const good = Object.entries(link).filter(([name]) => !problems.has(name));
  return {
    used: sliceQuery.parse({ age_ma: String(age_ma), ...Object.fromEntries(good) }),
    refused: [...problems].map(([name, problem]) => `${name}: read “${link[name] ?? ''}”, ${problem}`),
  };
}
