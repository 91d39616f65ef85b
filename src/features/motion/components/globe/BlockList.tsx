/** The picture in words: every block with its place and status at the age shown, each a button that selects it. */
import { coordinates } from '../../format';
import { placeOf, turn, vectorOf } from '../../globe/matrix';
import { matrixOf, statusOf } from '../../scene/frame';
import { ownPoint } from '../../scene/points';
import { select } from '../../store/actions';
import { useBench, useFrame, useWorkbench } from '../bench';

export function BlockList({ id }: { readonly id: string }) {
  const { store, scene } = useBench();
  const frame = useFrame();
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
