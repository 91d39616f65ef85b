export const sliceFileName = (slug: string, version: string, age_ma: number, extension: string): string =>
  `${slug}-${version === 'draft' ? 'draft' : `v${version}`}-${age_ma.toFixed(1)}-ma.${extension}`;
