/** What a slice is drawn from: one state's model, blocks and lines, and what the page must say of them. */
import type { Geometry } from 'geojson';
import type { Evidence, Model } from '../../../kernel/rotations/types';

export interface SliceBlock {
  readonly code: string;
  readonly name: string;
  readonly evidence: Evidence;
  readonly source: string | null;
  readonly outlines: readonly {
    readonly sha256: string;
    readonly inside: 'smaller' | 'larger';
    readonly outline_older_ma: number | null;
    readonly outline_younger_ma: number | null;
    readonly source: string | null;
  }[];
}

export interface SliceLine {
  readonly block: string;
  readonly sha256: string;
  readonly source: string | null;
  readonly appears_ma: number | null;
  readonly disappears_ma: number | null;
}

export interface SliceSubject {
  readonly title: string;
  /** "Draft, revision 12" or "Version 7, sha256 d630 be0a …". */
  readonly version: string;
  readonly licence: string | null;
  readonly date: string;
  readonly model: Model;
  readonly frame: { readonly code: string; readonly name: string };
  readonly blocks: readonly SliceBlock[];
  /** Present coasts, carried by their block. */
  readonly coasts: readonly SliceLine[];
  readonly geometryOf: (sha256: string) => Geometry;
}
