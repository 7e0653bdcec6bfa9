import { afterAll, beforeAll, describe, expect, test } from 'vitest';

import { listAudit } from '../../db/store/audit';
import { DEMO_PEOPLE } from '../../server/demo/people';
import { buildHarrowFen } from '../../server/demo/harrow-fen';
import { addWeeks } from '../../server/time/local-week';
import { realModel } from '../../server/model';
import { ROLES } from '../../src/contract/enums';
import { startTestServer, type Caller, type TestServer } from '../support/test-server';

let server: TestServer;
let engineer: Caller;
beforeAll(async () => {
  server = await startTestServer({ model: realModel, demoField: async (nowAt) => buildHarrowFen(nowAt) });
  engineer = await server.as('fieldEngineer');
});
afterAll(() => server.stop());

const week = async () => (await engineer.get(`/api/fields/${server.fieldId}`)).body;

describe('the demonstration field', () => {
  test('is Harrow Fen, with the wells, the zones and the past that its story needs', async () => {
    const { field, wells, pastWeeks } = await week();
    expect(field.name).toBe('Harrow Fen');
    const count = (kind: string, control?: boolean) =>
      wells.filter((well: any) => well.kind === kind && (control === undefined || well.control === control))
        .length;
    expect([count('producer'), count('injector'), count('injector', false), count('monitor')]).toEqual([
      3, 7, 1, 2,
    ]);
    const { sqlite } = server.context.database;
    expect(sqlite.prepare('select count(*) from zones').pluck().get()).toBe(2);
    expect(sqlite.prepare('select count(distinct week_starts_at) from metered_rates').pluck().get()).toBe(78);
    expect(pastWeeks).toHaveLength(26);
  });

  test('has one person for each role', async () => {
    expect(DEMO_PEOPLE.map(({ role }) => role).sort()).toEqual([...ROLES].sort());
    const { signIns } = (await server.stranger.get('/api/demo-sign-ins')).body;
    for (const { email, password, role } of signIns) {
      const person = await server.signIn(email, password);
      expect((await person.get('/api/me')).body.memberships).toMatchObject([{ roles: [role] }]);
    }
  });

  test('has its readings up to last week, and so has its catalogue', async () => {
    const { field, newestReadingAt, newestEventAt, steps } = await week();
    expect(newestReadingAt).toBe(addWeeks(field.weekStartsAt, -1, field.timeZone));
    expect(newestEventAt).toBeLessThan(field.weekStartsAt);
    expect(steps[0].state).toBe('done');
  });

  test('can deliver what was sold, and an engineer may ask for it as it stands', async () => {
    const { request } = (await engineer.get(`/api/fields/${server.fieldId}/plan-defaults`)).body;
    const { name: _name, notes: _notes, objective: _kind, lookAheadWeeks: _weeks, ...horizon } = request;
    const { body } = await engineer.post(`/api/fields/${server.fieldId}/check-target`, horizon);
    expect(body).toMatchObject({ feasible: true, sentence: 'The rates can deliver every target.' });
  });

  test('is seeded into an empty database once', async () => {
    const { dataDir, context } = server;
    const again = await startTestServer({
      dataDir,
      demoField: () => Promise.reject(new Error('seeded again')),
    });
    await again.stop();
    const events = listAudit(context.database.db, server.fieldId).map(({ event }) => event);
    expect(events.filter((event) => event === 'demoFieldSeeded')).toHaveLength(1);
  });
});
