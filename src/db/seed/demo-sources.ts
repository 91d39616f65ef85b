import type { SourceFields } from '~/features/ledger/contract';

const paper = (
  cite: string,
  year: number,
  authors: string[],
  title: string,
  container: string,
  note: string | null = null,
): SourceFields => ({
  cite,
  title,
  authors,
  year,
  container,
  doi: null,
  licence: 'CC BY 4.0',
  note,
});

/** The invented literature of the demo: none of it exists. */
export const DEMO_SOURCES: readonly SourceFields[] = [
  paper(
    'Tolland et al. 2021',
    2021,
    ['Tolland, E.', 'Brisk, A.', 'Pell, J.'],
    'Absolute motion of the Tarn and Old Harrow cratons since 178 Ma',
    'Journal of Invented Tectonics',
  ),
  paper(
    'Ashgrove & Pell 2019',
    2019,
    ['Ashgrove, T.', 'Pell, J.'],
    'Magnetic isochrons between Sable and Tarn',
    'Journal of Invented Tectonics',
  ),
  paper(
    'Osgood 2011',
    2011,
    ['Osgood, R.'],
    'Early opening of the Lantern Sea',
    'Invented Marine Geophysics',
  ),
  paper(
    'Merrow 2014',
    2014,
    ['Merrow, L.'],
    'A spin axis frame for the mantle of the scenario',
    'Invented Geodynamics',
  ),
  paper(
    'Lund & Quarrie 2020',
    2020,
    ['Lund, S.', 'Quarrie, D.'],
    'Palaeomagnetism of the Gannet beds: lavas',
    'Invented Palaeomagnetism',
  ),
  paper(
    'Pell 2016',
    2016,
    ['Pell, J.'],
    'Red sandstones of the Gannet beds',
    'Invented Sedimentology',
    'Inclination may be shallow: no f is given.',
  ),
  paper(
    'Harl & Wynn 2018',
    2018,
    ['Harl, M.', 'Wynn, C.'],
    'Outlines of the cratons from gravity',
    'Invented Geophysics',
  ),
  paper(
    'Stannard Survey 2009',
    2009,
    ['Stannard Survey'],
    'Geological map of the Stannard craton, sheet 4',
    'Survey maps',
  ),
  paper(
    'Fenn 2017',
    2017,
    ['Fenn, O.'],
    'Fracture zones east of the Fennick terrane',
    'Invented Marine Geophysics',
  ),
  paper(
    'Marlowe 2015',
    2015,
    ['Marlowe, K.'],
    'The Marl microcontinent and its margins',
    'Journal of Invented Tectonics',
  ),
  paper(
    'Quillan & Reed 2022',
    2022,
    ['Quillan, B.', 'Reed, F.'],
    'Age and polarity of the Quill arc',
    'Invented Volcanology',
  ),
  paper(
    'this project',
    2026,
    ['Kell, M.', 'Ashgrove, T.', 'Lund, S.'],
    'Posed and fitted in this project',
    'Closing of the Lantern Sea',
  ),
];

/** Who drew each outline. */
export const OUTLINE_SOURCES: Readonly<Record<string, string>> = {
  'old-harrow': 'Harl & Wynn 2018',
  tarn: 'Harl & Wynn 2018',
  stannard: 'Stannard Survey 2009',
  sable: 'Ashgrove & Pell 2019',
  fennick: 'Fenn 2017',
  marl: 'Marlowe 2015',
  quill: 'Quillan & Reed 2022',
  wether: 'Fenn 2017',
  corrie: 'this project',
  tessel: 'this project',
};
