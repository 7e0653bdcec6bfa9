import { type ReactNode } from 'react';
import { View } from 'react-native';

import { SPACE, useTokens } from '../theme';
import { Words } from '../words';

interface SectionProps {
  title: string;
  /** One plain sentence that says what to see. */
  intro?: ReactNode;
  aside?: ReactNode;
  children: ReactNode;
}

/** A part of a page: a hairline above, a heading, what it holds. */
export function Section({ title, intro, aside, children }: SectionProps) {
  const tokens = useTokens();
  return (
    <View
      role="region"
      aria-label={title}
      style={{
        borderTopWidth: 1,
        borderTopColor: tokens.hairline,
        paddingTop: SPACE.two,
        gap: SPACE.two,
        minWidth: 0,
      }}
    >
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: SPACE.one, alignItems: 'flex-start' }}>
        <View style={{ flexGrow: 1, flexShrink: 1, flexBasis: 220, gap: SPACE.half }}>
          <Words size="title" weight="medium" level={2}>
            {title}
          </Words>
          {typeof intro === 'string' ? (
            <Words tone="quiet" style={{ maxWidth: 720 }}>
              {intro}
            </Words>
          ) : (
            intro
          )}
        </View>
        {aside}
      </View>
      {children}
    </View>
  );
}
