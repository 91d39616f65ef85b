/** Stands on every sheet and cannot be left out. */
export const CAUTION_LINE =
  'A reconstruction is a model, not an observation. Palaeomagnetism gives latitude and orientation, not longitude. Not for navigation, land claims, hazard or exploration decisions.';
