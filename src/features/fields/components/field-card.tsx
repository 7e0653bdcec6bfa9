import { View } from 'react-native';

import type { FieldCard as Field } from '../../../contract/fields';
import { listed, multiple, percent, weekdayName } from '../../../lib/format';
import { PLAN_STATE_NAMES, ROLE_NAMES } from '../../../lib/words';
import { Icon } from '../../../ui/icon';
import { PressLink } from '../../../ui/press-link';
import { QuantityWords } from '../../../ui/quantity-words';
import { SPACE, useTokens } from '../../../ui/theme';
import { Words } from '../../../ui/words';

/** A field at a glance; all of it leads to its week. */
export function FieldCard({ field }: { field: Field }) {
  const tokens = useTokens();
  const { newestPlan } = field;
  return (
    <View role="listitem" style={{ flexGrow: 1, flexShrink: 1, flexBasis: 320, maxWidth: 560 }}>
      <PressLink
        href={{ pathname: '/fields/[fieldId]', params: { fieldId: field.id } }}
        label={`${field.name}, this week`}
        style={{
          padding: SPACE.three,
          gap: SPACE.two,
          backgroundColor: tokens.surface,
          borderWidth: 1,
          borderColor: tokens.hairline,
        }}
      >
        <View style={{ flexDirection: 'row', alignItems: 'flex-start', gap: SPACE.one }}>
          <View style={{ flexGrow: 1, flexShrink: 1 }}>
            <Words size="title" weight="medium" level={2}>
              {field.name}
            </Words>
            <Words tone="quiet">{field.place}</Words>
          </View>
          <Icon name="right" color={tokens.quiet} />
        </View>
        {newestPlan ? (
          <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: SPACE.four }}>
            <Figure name="Forecast, × background">
              <QuantityWords
                quantity={multiple(newestPlan.rateMultiple)}
                size="head"
                tone="plum"
                weight="medium"
              />
            </Figure>
            <Figure name="Energy against target">
              <QuantityWords
                quantity={percent(newestPlan.heatJ / newestPlan.heatTargetJ)}
                size="head"
                tone="ember"
                weight="medium"
              />
            </Figure>
          </View>
        ) : (
          <Words tone="quiet">No plan has been computed yet.</Words>
        )}
        <View style={{ gap: SPACE.half }}>
          {newestPlan && (
            <Words tone="quiet">
              Plan {newestPlan.number}, {PLAN_STATE_NAMES[newestPlan.state].toLowerCase()} · week of{' '}
              {weekdayName(field.weekStartsAt, field.timeZone)}
            </Words>
          )}
          {field.waitsForMe && (
            <View style={{ flexDirection: 'row', gap: SPACE.one, alignItems: 'center' }}>
              <Icon name="clock" size={20} color={tokens.primary} />
              <Words tone="primary" weight="medium" style={{ flexShrink: 1 }}>
                {field.waitsForMe}
              </Words>
            </View>
          )}
          <Words size="small" tone="quiet">
            You: {listed(field.roles.map((role) => ROLE_NAMES[role].toLowerCase()))}
          </Words>
        </View>
      </PressLink>
    </View>
  );
}

function Figure({ name, children }: { name: string; children: React.ReactNode }) {
  return (
    <View>
      <Words size="small" tone="quiet">
        {name}
      </Words>
      {children}
    </View>
  );
}
