import { useState } from 'react';
import { View } from 'react-native';

import type { PlanResult } from '../../../contract/plans';
import { counted } from '../../../lib/format';
import { Button } from '../../../ui/button';
import { SPACE, useTokens } from '../../../ui/theme';
import { Words } from '../../../ui/words';

const SHOWN_FIRST = 5;

/** The limits that cost something. */
export function WhatBinds({ binding }: { binding: PlanResult['binding'] }) {
  const tokens = useTokens();
  const [isAll, setIsAll] = useState(false);
  if (binding.length === 0) {
    return <Words>No limit stands in the way: the plan is as quiet as these wells can be.</Words>;
  }
  const shown = isAll ? binding : binding.slice(0, SHOWN_FIRST);
  return (
    <View style={{ gap: SPACE.one }}>
      <View role="list">
        {shown.map((limit, index) => (
          <View
            key={`${limit.limit}-${limit.well ?? ''}-${limit.week ?? ''}-${index}`}
            role="listitem"
            style={{
              paddingVertical: SPACE.one,
              borderTopWidth: index === 0 ? 0 : 1,
              borderTopColor: tokens.hairline,
            }}
          >
            <Words>{limit.sentence}</Words>
          </View>
        ))}
      </View>
      {binding.length > SHOWN_FIRST && (
        <View style={{ alignItems: 'flex-start' }}>
          <Button kind="quiet" icon={isAll ? 'up' : 'down'} onPress={() => setIsAll(!isAll)}>
            {isAll ? `Show the ${SHOWN_FIRST} dearest` : `Show all ${counted(binding.length, 'limit')}`}
          </Button>
        </View>
      )}
    </View>
  );
}
