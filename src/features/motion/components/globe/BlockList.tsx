/** The picture in words: every block with its place and status at the age shown, each a button that selects it. */
import { useMemo } from 'react';
import { coordinates } from '../../format';
import { placeOf, turn, vectorOf } from '../../globe/matrix';
import { frameAt, matrixOf, statusOf } from '../../scene/frame';
import { ownPoint } from '../../scene/points';
import { select } from '../../store/actions';
import { useBench, useCalmAge, useWorkbench } from '../bench';

export function BlockList({ id }: { readonly id: string }) {
  const { store, scene, model } = useBench();
  const heldStill = useWorkbench((state) => state.heldStill);
  const age = useCalmAge();
  const frame = useMemo(() => frameAt(model, age, heldStill), [model, age, heldStill]);
  const selected = useWorkbench((state) => state.block);
  return (
    <div id={id} className="sr-only">
      <h3>Blocks on the globe</h3>
      <ul>
        {scene.blocks.map((block) => {
          const point = ownPoint(scene, block);
          if (!point) return null;
          const pose = matrixOf(frame, block.code);
          const at = pose && placeOf(turn(pose, vectorOf(point.lat, point.lon)));
          return (
            <li key={block.code}>
              <button
                type="button"
                tabIndex={-1}
                aria-pressed={block.code === selected}
                onClick={() => select(store, block.code)}
              >
                {`${block.name}, ${block.evidence}: ${at ? coordinates(at.lat, at.lon) : statusOf(frame, block.code)}`}
              </button>
            </li>
          );
        })}
      </ul>
    </div>
  );
}
