import type { Role } from '../../src/contract/enums';

/** The invented crew of a demonstration server. Their passwords are public, so they never exist in production. */
export const DEMO_PEOPLE: readonly { name: string; email: string; password: string; role: Role }[] = [
  { name: 'Maren Oakhill', email: 'maren@example.com', password: 'fen-engineer-demo', role: 'fieldEngineer' },
  {
    name: 'Tobin Ashwell',
    email: 'tobin@example.com',
    password: 'fen-production-demo',
    role: 'productionLead',
  },
  { name: 'Idris Calderwick', email: 'idris@example.com', password: 'fen-safety-demo', role: 'hseOfficer' },
  { name: 'Linnea Farrowby', email: 'linnea@example.com', password: 'fen-admin-demo', role: 'administrator' },
];
