/** Directions of the selected block, to read: what each says of the latitude, and what the reconstruction says. */
import { useMemo } from 'react';
import { number, signed } from '../../format';
import { observedOn } from '../../log/observed';
import { latitudeAt } from '../../log/series';
import { setAge } from '../../store/actions';
import { useBench, useWorkbench } from '../bench';

export function DirectionsLedger() {
  const { store, scene, model } = useBench();
  const code = useWorkbench((state) => state.block);
  const heldStill = useWorkbench((state) => state.heldStill);
  const rows = useMemo(() => {
    if (!code) return [];
    return observedOn(scene.directions, code)
      .sort((a, b) => a.age - b.age)
      .map((datum) => {
        const site = scene.directions.find(({ id }) => id === datum.id)!;
        const point = {
          block: code,
          lat: site.lat,
          lon: site.lon,
          name: site.site,
          subject: site.site,
          plural: false,
        };
        return { datum, site, predicted: latitudeAt(model, point, heldStill, datum.age)?.lat ?? null };
      });
  }, [scene.directions, model, code, heldStill]);
  if (rows.length === 0) {
    return (
      <p className="t-body text-ink-2 grow px-3.5 py-3">
        {code ? 'No directions on this block yet.' : 'Select a block to see its directions.'}{' '}
        <a className="link" href="import">
          Import
        </a>
      </p>
    );
  }
  const head = [['Site', ''], ['Age', 'Ma'], ['Incl.', '°'], ['n', ''], ['α95', '°'], ['Latitude', '°N'], ['from', '°N'], ['to', '°N'], ['predicted', '°N'], ['differs', '°']] as const; // prettier-ignore
  return (
    <div className="min-h-0 grow overflow-auto" tabIndex={0} role="region" aria-label="Directions">
      <table className="t-table w-full border-collapse">
        <thead className="bg-paper sticky top-0">
          <tr className="border-frame border-b [&>th]:px-2 [&>th]:py-1 [&>th]:font-medium">
            {head.map(([name, unit]) => (
              <th key={name} scope="col" className={name === 'Site' ? 'text-left' : 'text-right'}>
                {name} <span className="text-ink-2 block font-normal">{unit || '\u00a0'}</span>
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {rows.map(({ datum, site, predicted }) => {
            const outside = predicted !== null && (predicted < datum.lower || predicted > datum.upper);
            return (
              <tr
                key={datum.id}
                className="border-rule [&>td:not(:first-child)]:tabular h-[21px] border-b [&>td]:px-2 [&>td:not(:first-child)]:text-right"
              >
                <td>
                  <button className="hover:underline" onClick={() => setAge(store, datum.age, scene.oldest)}>
                    {datum.site}
                  </button>
                </td>
                <td>{number(datum.age, 1)}</td>
                <td>{number(site.inclination ?? NaN, 1)}</td>
                <td>{datum.n ?? ''}</td>
                <td>{site.alpha95 === null ? '' : number(site.alpha95, 1)}</td>
                <td>{number(datum.lat, 1)}</td>
                <td>{number(datum.lower, 1)}</td>
                <td>{number(datum.upper, 1)}</td>
                <td>{predicted === null ? 'none' : number(predicted, 1)}</td>
                <td className={outside ? 'text-ochre-ink font-semibold' : ''}>
                  {predicted === null ? '' : signed(datum.lat - predicted, 1)}
                </td>
              </tr>
            );
          })}
        </tbody>
      </table>
    </div>
  );
}
