/** What the demo's rows read before they were refitted, and what was noted on them since the last version. */
export interface RotationEdit {
  readonly row: { readonly block: string; readonly relative_to: string; readonly age_ma: number };
  readonly fields: Readonly<Record<string, unknown>>;
  /** The values of the file, to go back to. */
  readonly now?: Readonly<Record<string, unknown>>;
}

type Pole = readonly [pole_lat: number, pole_lon: number, angle_deg: number];
const pole = ([pole_lat, pole_lon, angle_deg]: Pole) => ({ pole_lat, pole_lon, angle_deg });
const was = (
  block: string,
  relative_to: string,
  age_ma: number,
  before: Pole,
  after: Pole,
): RotationEdit => ({
  row: { block, relative_to, age_ma },
  fields: pole(before),
  now: pole(after),
});

export const BEFORE_SABLE_REFIT: readonly RotationEdit[] = [
  was('sable', 'tarn', 61.3, [7.65, -9.58, 5.84], [6.75, -8.18, 6.89]),
  was('sable', 'tarn', 66, [3.84, -28.94, 8.02], [2.54, -27.04, 9.64]),
  was('sable', 'tarn', 73.6, [1.58, -41.73, 13.95], [0.78, -40.63, 14.89]),
];

export const BEFORE_QUILL_POSED: readonly RotationEdit[] = [
  was('quill', 'mantle', 60, [58.26, -119.88, -15.75], [58.26, -122.08, -17.15]),
  was('quill', 'mantle', 80, [61.65, -120.22, -24.4], [61.65, -121.82, -25.5]),
];

const note = (block: string, relative_to: string, age_ma: number, text: string) => ({
  row: { block, relative_to, age_ma },
  fields: { note: text },
  label: `Note on ${block} at ${age_ma} Ma`,
});

/** Fourteen small edits since version 7. */
export const LATER_NOTES: readonly (RotationEdit & { readonly label: string })[] = [
  note('sable', 'tarn', 83, 'No covariance in the paper; asked for.'),
  note('sable', 'tarn', 55.2, 'Hand-over: collision with Old Harrow.'),
  note('sable', 'old-harrow', 55.2, 'Hand-over: collision with Old Harrow.'),
  note('sable', 'tarn', 132, 'Posed against the southern margin of Tarn.'),
  note('sable', 'tarn', 150, 'Held to Tarn before opening.'),
  note('sable', 'tarn', 178, 'Held to Tarn before opening.'),
  note('quill', 'mantle', 60, 'Posed again after the outline was redrawn.'),
  note('quill', 'mantle', 80, 'Posed again after the outline was redrawn.'),
  note('tarn', 'mantle', 150, 'Posed: no isochrons of this age.'),
  note('tarn', 'mantle', 178, 'Posed: no isochrons of this age.'),
  note('marl', 'mantle', 60, 'Margin fit to be tried.'),
  note('fennick', 'mantle', 60, 'Check the sign of the stage pole.'),
  note('corrie', 'mantle', 100, 'Nothing constrains this age.'),
  note('tessel', 'mantle', 100, 'Nothing constrains this age.'),
];
