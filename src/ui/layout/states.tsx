import { type ReactNode } from 'react';
import { ActivityIndicator } from 'react-native-paper';
import { View } from 'react-native';

import { ApiError } from '../../api/client';
import { Button } from '../button';
import { Icon } from '../icon';
import { LogoMark } from '../logo';
import { SPACE, useTokens } from '../theme';
import { Words } from '../words';

/** A short wait; whatever takes longer shows its progress instead. */
export function Loading({ what }: { what: string }) {
  return (
    <View
      role="status"
      aria-label={`Loading ${what}`}
      style={{ padding: SPACE.six, alignItems: 'center', gap: SPACE.two }}
    >
      <ActivityIndicator aria-hidden />
      <Words tone="quiet">Loading {what} …</Words>
    </View>
  );
}

/** What happened, what was kept, what to do. */
export function Failed({ what, error, retry }: { what: string; error: Error; retry: () => void }) {
  const isRefusal = error instanceof ApiError && (error.status === 403 || error.status === 404);
  if (isRefusal) return <Refused error={error} />;
  return (
    <Notice icon="alert" title={`${what} could not be loaded`} role="alert">
      <Words tone="quiet" align="center">
        {error.message}
      </Words>
      <Button icon="again" onPress={retry}>
        Try again
      </Button>
    </Notice>
  );
}

function Refused({ error }: { error: ApiError }) {
  const title = error.status === 403 ? 'You may not see this' : 'There is nothing here';
  return (
    <Notice icon={error.status === 403 ? 'stop' : 'alert'} title={title} role="alert">
      <Words tone="quiet" align="center">
        {error.message}
      </Words>
      {error.status === 403 && (
        <Words tone="quiet" align="center">
          An administrator of the field can give you a role in it.
        </Words>
      )}
    </Notice>
  );
}

/** Nothing yet, and what to do about it. */
export function Empty({ title, children }: { title: string; children?: ReactNode }) {
  return (
    <Notice title={title}>
      {typeof children === 'string' ? (
        <Words tone="quiet" align="center" style={{ maxWidth: 480 }}>
          {children}
        </Words>
      ) : (
        children
      )}
    </Notice>
  );
}

function Notice(props: { title: string; icon?: 'alert' | 'stop'; role?: 'alert'; children: ReactNode }) {
  const tokens = useTokens();
  return (
    <View
      role={props.role}
      style={{
        paddingVertical: SPACE.six,
        paddingHorizontal: SPACE.two,
        alignItems: 'center',
        gap: SPACE.small,
        maxWidth: 560,
        alignSelf: 'center',
      }}
    >
      {props.icon ? (
        <Icon name={props.icon} size={32} color={tokens.ember} />
      ) : (
        <LogoMark height={32} color={tokens.quiet} />
      )}
      <Words size="title" weight="medium" level={2} align="center">
        {props.title}
      </Words>
      {props.children}
    </View>
  );
}
