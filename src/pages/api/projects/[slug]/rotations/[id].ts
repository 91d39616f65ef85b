import { member } from '~/features/ledger/routes';

export const { PATCH, DELETE } = member('rotations');
