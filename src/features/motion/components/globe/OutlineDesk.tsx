/** Drawing a block's outline on the globe, and moving the corners of one that is there. Kept as one step, or put back. */
import { useQueryClient } from '@tanstack/react-query';
import { useEffect, useRef, useState } from 'react';
import type { MultiPolygon, Polygon } from 'geojson';
import type { Edit } from '../../../ledger/contract';
import { getJson, keys } from '../../client';
import { age as ageText, count } from '../../format';
import {
  added,
  moved,
  outlineFault,
  present,
  removed,
  ringAt,
  ringNames,
  ringsOf,
  seen,
  split,
  toGeometry,
  toPolygon,
  withRing,
  type Corners,
  type RingPlace,
  type Rings,
} from '../../globe/outline-edit';
import { select } from '../../store/actions';
import { useBench, useFrame, useWorkbench } from '../bench';
import { matrixOf } from '../../scene/frame';
import { holdsAt } from '../../../../kernel/rotations/circuit';
import { useDraft } from '../ledger/use-draft';
import { useSize } from '../use-size';
import { NewBlockForm, type NewBlock } from './NewBlockForm';
import { OutlineHandles } from './OutlineHandles';
import { RingChoice } from './RingChoice';
import { useDisc } from './use-disc';

type Work =
  | { readonly name: 'drawing'; readonly block: string | null; readonly corners: Corners }
  | { readonly name: 'naming'; readonly corners: Corners }
  | {
      readonly name: 'editing';
      readonly block: string;
      readonly outline: string;
      /** Of the ring under edit. */
      readonly corners: Corners;
      readonly at: RingPlace;
      readonly rings: Rings;
    };

function faultOf(work: Exclude<Work, { name: 'naming' }>): string | null {
  if (work.name === 'drawing') return outlineFault(work.corners);
  const rings = withRing(work.rings, work.at, work.corners);
  for (const { at, name } of ringNames(rings)) {
    const fault = outlineFault(ringAt(rings, at));
    if (fault) return ringNames(rings).length > 1 ? `${name}: ${fault}` : fault;
  }
  return null;
}

/** A press that moves further turns the globe. */
const SLACK = 4;

export function OutlineDesk({ slug }: { readonly slug: string }) {
  const { store } = useBench();
  const client = useQueryClient();
  const draft = useDraft(slug);
  const frame = useFrame();
  const code = useWorkbench((state) => state.block);
  const ageMa = useWorkbench((state) => state.age);
  const [work, setWork] = useState<Work | null>(null);
  const [words, setWords] = useState('');
  const [box, size] = useSize<HTMLDivElement>({ width: 600, height: 500 });
  const disc = useDisc(size);

  const own = work && work.name !== 'naming' ? work.block : null;
  const pose = own === null ? null : matrixOf(frame, own);
  const block = draft.blocks.find((one) => one.code === code);
  const outline = block?.outlines.find(({ outline_older_ma, outline_younger_ma }) =>
    holdsAt(outline_older_ma, outline_younger_ma, ageMa),
  );

  const put = (corners: Corners): void => {
    setWords('');
    setWork((now) => (now ? { ...now, corners } : now));
  };
  const leave = (say = ''): void => {
    setWork(null);
    setWords(say);
  };

  const press = useRef<readonly [number, number] | null>(null);
  useEffect(() => {
    const panel = box.current?.parentElement;
    if (!panel || work?.name !== 'drawing') return undefined;
    const down = (event: PointerEvent): void => {
      press.current = [event.clientX, event.clientY];
    };
    const up = (event: PointerEvent): void => {
      const from = press.current;
      press.current = null;
      const onGlobe = event.target instanceof Element && event.target.closest('[role="application"]');
      if (!from || !onGlobe) return;
      if (Math.hypot(event.clientX - from[0], event.clientY - from[1]) > SLACK) return;
      const bounds = panel.getBoundingClientRect();
      const v = disc.under([event.clientX - bounds.left, event.clientY - bounds.top]);
      setWords('');
      if (v)
        setWork((now) =>
          now?.name === 'drawing' ? { ...now, corners: added(now.corners, present(v, pose)) } : now,
        );
    };
    panel.addEventListener('pointerdown', down, true);
    panel.addEventListener('pointerup', up, true);
    return () => {
      panel.removeEventListener('pointerdown', down, true);
      panel.removeEventListener('pointerup', up, true);
    };
  }, [box, work?.name, disc, pose]);

  const run = async (edits: readonly Edit[], label: string, say: string): Promise<void> => {
    if (!(await draft.run(edits, label))) return;
    await client.invalidateQueries({ queryKey: keys.table(slug, 'draft', 'blocks') });
    leave(say);
  };

  const begin = async (): Promise<void> => {
    if (!block || !outline) return;
    const geometry = await getJson<Polygon | MultiPolygon>(`/api/geometry/${outline.sha256}?format=geojson`);
    const rings = ringsOf(geometry);
    const at = { part: 0, ring: 0 };
    setWords('');
    setWork({
      name: 'editing',
      block: block.code,
      outline: outline.id,
      rings,
      at,
      corners: ringAt(rings, at),
    });
  };

  const finish = (): void => {
    if (!work || work.name === 'naming') return;
    const fault = faultOf(work);
    if (fault) return setWords(fault);
    if (work.name === 'editing') {
      const geometry = toGeometry(withRing(work.rings, work.at, work.corners));
      void run(
        [{ op: 'update', table: 'outlines', id: work.outline, fields: { geometry } }],
        `Move corners of ${work.block}`,
        'The outline is kept.',
      );
    } else if (work.block) {
      void run(
        [
          {
            op: 'create',
            table: 'outlines',
            fields: { block: work.block, geometry: toPolygon(work.corners) },
          },
        ],
        `Draw the outline of ${work.block}`,
        'The outline is kept.',
      );
    } else setWork({ name: 'naming', corners: work.corners });
  };

  const make = async (fields: NewBlock): Promise<void> => {
    if (work?.name !== 'naming') return;
    const geometry = toPolygon(work.corners);
    const edits: Edit[] = [
      { op: 'create', table: 'blocks', fields: { ...fields } },
      { op: 'create', table: 'outlines', fields: { block: fields.code, geometry } },
    ];
    await run(edits, `Draw ${fields.name}`, `${fields.name} is drawn.`);
    select(store, fields.code);
  };

  useEffect(() => {
    if (!work) return undefined;
    const onKey = (event: globalThis.KeyboardEvent): void => {
      if (
        event.target instanceof HTMLElement &&
        event.target.closest('input, select, textarea, [role="grid"]')
      )
        return;
      if (event.key === 'Escape') leave('Put back.');
      else if (event.key === 'Enter' && !(event.target instanceof HTMLButtonElement)) finish();
      else if (event.key === 'Backspace' && work.name === 'drawing')
        put(removed(work.corners, work.corners.length - 1));
      else return;
      event.preventDefault();
      event.stopPropagation();
    };
    document.addEventListener('keydown', onKey, true);
    return () => document.removeEventListener('keydown', onKey, true);
  });

  const needsOutline =
    block !== undefined && block.kind !== 'frame' && !outline && matrixOf(frame, block.code) !== null;
  return (
    <div ref={box} className="pointer-events-none absolute inset-0">
      {work && work.name !== 'naming' && (
        <OutlineHandles
          corners={work.corners}
          closed={work.name === 'editing'}
          disc={disc}
          show={(v) => seen(v, pose)}
          hide={(v) => present(v, pose)}
          onMove={(i, v) => put(moved(work.corners, i, v))}
          onRemove={(i) => put(removed(work.corners, i))}
          onSplit={(i) => put(split(work.corners, i))}
        />
      )}
      <div className="pointer-events-auto absolute right-2 bottom-2 flex max-w-[320px] flex-col items-end gap-1.5">
        <p className="t-body bg-paper/90 px-1 text-right" role="status">
          {words !== '' && work !== null && work.name !== 'naming'
            ? words
            : work?.name === 'drawing'
              ? `${count(work.corners.length, 'corner')}: click to add one, Backspace takes the last, Enter closes, Esc leaves.`
              : work?.name === 'editing'
                ? 'Drag a corner, or press a midpoint for a new one. Enter keeps, Esc puts back.'
                : (draft.refused ?? words)}
        </p>
        {work?.name === 'naming' && (
          <NewBlockForm
            busy={draft.saving}
            refused={draft.refused}
            onKeep={(fields) => void make(fields)}
            onPutBack={() => leave('Put back.')}
          />
        )}
        {work?.name === 'editing' && ringNames(work.rings).length > 1 && (
          <RingChoice
            rings={work.rings}
            at={work.at}
            onChoose={(at) => {
              const rings = withRing(work.rings, work.at, work.corners);
              setWork({ ...work, rings, at, corners: ringAt(rings, at) });
            }}
          />
        )}
        <div className="flex gap-1.5">
          {work && work.name !== 'naming' ? (
            <>
              <button className="button bg-paper" onClick={() => leave('Put back.')}>
                Put back
              </button>
              <button
                className="button button-main"
                disabled={work.corners.length < 3 || draft.saving}
                onClick={finish}
              >
                Keep the outline
              </button>
            </>
          ) : (
            !work && (
              <>
                {outline && (
                  <button
                    className="button bg-paper whitespace-nowrap"
                    aria-label={`Move corners of ${block!.name}`}
                    onClick={() => void begin()}
                  >
                    Move corners
                  </button>
                )}
                <button
                  className="button bg-paper whitespace-nowrap"
                  onClick={() => {
                    const carried = needsOutline ? block.code : null;
                    setWords('');
                    setWork({ name: 'drawing', block: carried, corners: [] });
                  }}
                >
                  {needsOutline ? `Draw ${block.name}` : 'Draw an outline'}
                </button>
              </>
            )
          )}
        </div>
        {work?.name === 'drawing' && work.block === null && ageMa > 0 && (
          <p className="t-label bg-paper/90 text-ink-2 px-1 text-right">
            A new block is drawn where it lies today: what is clicked at {ageText(ageMa)} is taken as that.
          </p>
        )}
      </div>
    </div>
  );
}
