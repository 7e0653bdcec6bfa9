import { type ReactNode } from 'react';
import { View } from 'react-native';

import { usePageTitle } from '../../lib/platform/page-title';
import { useWidth } from '../../lib/use-width';
import { CONTENT_MAX_WIDTH, SPACE } from '../theme';
import { Words } from '../words';

interface ScreenProps {
  title: string;
  /** What the page title says beside it, usually the field. */
  of?: string;
  /** One line under the title. */
  intro?: ReactNode;
  /** What to press here: beside the title on a wide screen, within reach of a thumb on a phone. */
  action?: ReactNode;
  /** Above the title: the way back. */
  above?: ReactNode;
  /** 2 where it stands beside a page's own title. */
  level?: 1 | 2;
  children: ReactNode;
}

/** Width, gutters, title and primary action of every page. */
export function Screen({ title, of, intro, action, above, level = 1, children }: ScreenProps) {
  usePageTitle(title, of);
  const { gutter, hasRail } = useWidth();
  return (
    <View
      style={{
        width: '100%',
        maxWidth: CONTENT_MAX_WIDTH,
        paddingHorizontal: gutter,
        paddingTop: hasRail ? SPACE.four : SPACE.two,
        paddingBottom: SPACE.six,
        gap: SPACE.three,
      }}
    >
      <View style={{ gap: SPACE.half }}>
        {above}
        <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: SPACE.two, alignItems: 'flex-start' }}>
          <View style={{ flexGrow: 1, flexShrink: 1, flexBasis: 240, gap: SPACE.half }}>
            <Words size="head" weight="medium" level={level}>
              {title}
            </Words>
            {typeof intro === 'string' ? <Words tone="quiet">{intro}</Words> : intro}
          </View>
          {hasRail && action}
        </View>
      </View>
      {children}
      {!hasRail && action && <ThumbReach>{action}</ThumbReach>}
    </View>
  );
}

const BOTTOM_BAR_HEIGHT = 64;

/** Stays at the lower right while the page moves under it. */
function ThumbReach({ children }: { children: ReactNode }) {
  return (
    <View
      style={{
        position: 'sticky' as 'relative',
        bottom: BOTTOM_BAR_HEIGHT + SPACE.small,
        alignSelf: 'flex-end',
        borderRadius: 12,
        boxShadow: '0 2px 12px rgba(10, 20, 26, 0.28)',
        zIndex: 2,
      }}
    >
      {children}
    </View>
  );
}
