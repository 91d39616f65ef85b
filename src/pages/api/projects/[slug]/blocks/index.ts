import { collection } from '~/features/ledger/routes';

export const { GET, POST } = collection('blocks');
