/** The address of a slice, shared by the print page's preview, its downloads and its own link. */
import { DEFAULT_PROJECTION, type ProjectionName } from '../../kernel/cartography/projections';
import { USUAL_LAYERS, type Layer, type Paper } from './choices';

/** What the print page holds; every field has a value, so that the form is never half-filled. */
export interface SliceSettings {
  readonly age_ma: number;
  readonly relative_to: string;
  readonly projection: ProjectionName;
  readonly centre_lat: number;
  readonly centre_lon: number;
  readonly reach_deg: number | null;
  readonly layers: readonly Layer[];
  readonly paper: Paper;
  readonly orientation: 'landscape' | 'portrait';
  readonly title: string;
  readonly caption: string;
  readonly path_block: string;
  readonly path_lat: number | null;
  readonly path_lon: number | null;
  readonly path_step_ma: number;
}

export const usualSettings = (relative_to: string): SliceSettings => ({
  age_ma: 0,
  relative_to,
  projection: DEFAULT_PROJECTION,
  centre_lat: 0,
  centre_lon: 0,
  reach_deg: null,
  layers: USUAL_LAYERS,
  paper: 'a4',
  orientation: 'landscape',
  title: '',
  caption: '',
  path_block: '',
  path_lat: null,
  path_lon: null,
  path_step_ma: 10,
});

/** Query of a slice; blanks are left out, so that the server's own defaults hold. */
export function sliceSearch(settings: SliceSettings, version: string): string {
  const query = new URLSearchParams({ version });
  for (const [key, value] of Object.entries(settings) as [string, SliceSettings[keyof SliceSettings]][]) {
    if (value === null || value === '') continue;
    query.set(key, Array.isArray(value) ? value.join(',') : String(value));
  }
  if (settings.path_block === '' || settings.path_lat === null || settings.path_lon === null) {
    for (const key of ['path_block', 'path_lat', 'path_lon']) query.delete(key);
  }
  return `?${query}`;
}

export const sliceHref = (slug: string, format: string, search: string): string =>
  `/api/projects/${slug}/slice.${format}${search}`;
