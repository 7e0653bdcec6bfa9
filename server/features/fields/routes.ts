import { getFieldWeek, listFields } from '../../../src/contract/fields';
import { memberEndpoint, personEndpoint } from '../../http/endpoint';
import { mayListFields, mayReadField } from './policy';
import { fieldsOf, requireField } from './service';
import { fieldCard, fieldWeek } from './week';

export const fieldEndpoints = {
  listFields: personEndpoint(listFields, {
    load: ({ context, who }) => fieldsOf(context, who.id),
    policy: mayListFields,
    act: ({ context, subject }) => ({
      fields: subject.map(({ field, roles }) => fieldCard(context, field, roles)),
    }),
  }),
  getFieldWeek: memberEndpoint(getFieldWeek, {
    load: ({ context, params }) => requireField(context, params.fieldId),
    policy: mayReadField,
    act: ({ context, who, subject }) => fieldWeek(context, subject, [...who.roles]),
  }),
};
