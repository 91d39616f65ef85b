import type { Role } from './contract';

/** A project without a lead could neither release nor change its team. */
export const keepsALead = (roles: readonly Role[]): boolean => roles.includes('lead');
