import { View } from 'react-native';

import type { Role } from '../../../contract/enums';
import type { FieldWeek } from '../../../contract/fields';
import { ROLE_NAMES } from '../../../lib/words';
import { Icon, type IconName } from '../../../ui/icon';
import { SPACE, useTokens, type Tokens } from '../../../ui/theme';
import { Words } from '../../../ui/words';

type Step = FieldWeek['steps'][number];

const STEP_NAMES: Record<Step['step'], string> = {
  readings: 'Readings in',
  modelCheck: 'Does the model still hold?',
  refit: 'Refit the model',
  build: 'Build the plan',
  review: 'Review and sign',
  issue: 'Issue set-points',
  follow: 'Follow',
  report: 'Report',
};

/** A state is a word and a shape; the colour only repeats it. */
const STATES: Record<Step['state'], { word: string; icon: IconName; tone: keyof Tokens }> = {
  done: { word: 'Done', icon: 'check', tone: 'primary' },
  now: { word: 'Now', icon: 'clock', tone: 'ember' },
  next: { word: 'Next', icon: 'right', tone: 'quiet' },
  notUsed: { word: 'Not in use', icon: 'minus', tone: 'quiet' },
};

export function LoopSteps({ steps, roles }: { steps: Step[]; roles: Role[] }) {
  return (
    <View role="list">
      {steps.map((step, index) => (
        <StepRow key={step.step} step={step} isFirst={index === 0} isMine={roles.includes(step.who)} />
      ))}
    </View>
  );
}

function StepRow({ step, isFirst, isMine }: { step: Step; isFirst: boolean; isMine: boolean }) {
  const tokens = useTokens();
  const { word, icon, tone } = STATES[step.state];
  const isUsed = step.state !== 'notUsed';
  return (
    <View
      role="listitem"
      style={{
        flexDirection: 'row',
        gap: SPACE.small,
        paddingVertical: SPACE.one,
        borderTopWidth: isFirst ? 0 : 1,
        borderTopColor: tokens.hairline,
      }}
    >
      <Icon name={icon} size={20} color={tokens[tone]} />
      <View style={{ flexGrow: 1, flexShrink: 1, flexBasis: 0 }}>
        <View style={{ flexDirection: 'row', justifyContent: 'space-between', gap: SPACE.one }}>
          <Words weight="medium" tone={isUsed ? 'ink' : 'quiet'} style={{ flexShrink: 1 }}>
            {STEP_NAMES[step.step]}
          </Words>
          <Words
            size="small"
            tone={step.state === 'now' ? 'ember' : 'quiet'}
            weight="medium"
            style={{ lineHeight: 20 }}
          >
            {word}
          </Words>
        </View>
        {(isUsed || step.step === 'modelCheck') && <Words tone="quiet">{step.sentence}</Words>}
        {isUsed && (
          <Words size="small" tone="quiet">
            {ROLE_NAMES[step.who]}
            {isMine ? ' (you)' : ''}
          </Words>
        )}
      </View>
    </View>
  );
}
