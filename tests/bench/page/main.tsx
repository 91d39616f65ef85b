import { createRoot } from 'react-dom/client';
import '../../../src/styles/global.css';
import blocks from '../../../src/db/seed/lantern-sea/blocks.geojson?raw';
import directions from '../../../src/db/seed/lantern-sea/directions.csv?raw';
import features from '../../../src/db/seed/lantern-sea/features.geojson?raw';
import rotations from '../../../src/db/seed/lantern-sea/rotations.csv?raw';
import { lanternScene } from '../../support/lantern-scene';
import { Page } from './Page';

const scene = lanternScene({ blocks, directions, features, rotations });
const root = document.getElementById('root');
if (root) createRoot(root).render(<Page scene={scene} />);
