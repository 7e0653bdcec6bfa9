import type { listMemberships } from '../../../db/store/people';
import type { Role } from '../../../src/contract/enums';
import type { Me } from '../../../src/contract/people';
import type { Actor } from '../../http/session';

export function presentMe(actor: Actor, rows: ReturnType<typeof listMemberships>): Me {
  const roles = new Map<string, { fieldId: string; fieldName: string; roles: Role[] }>();
  for (const { fieldId, fieldName, role } of rows) {
    const membership = roles.get(fieldId) ?? { fieldId, fieldName, roles: [] };
    membership.roles.push(role);
    roles.set(fieldId, membership);
  }
  return { ...actor, memberships: [...roles.values()] };
}
