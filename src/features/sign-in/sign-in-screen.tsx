import { useMutation } from '@tanstack/react-query';
import { Redirect } from 'expo-router';
import { useState } from 'react';
import { View } from 'react-native';

import { usePageTitle } from '../../lib/platform/page-title';
import { useWidth } from '../../lib/use-width';
import { useSession } from '../../session/session-provider';
import { whereTo } from '../../session/where-to';
import { Button } from '../../ui/button';
import { FormBox } from '../../ui/form/form-box';
import { TextField } from '../../ui/form/text-field';
import { SPACE } from '../../ui/theme';
import { Words } from '../../ui/words';
import { DemoSignIns } from './components/demo-sign-ins';
import { StillLineScene } from './components/still-line-scene';

interface Credentials {
  email: string;
  password: string;
}

export function SignInScreen({ from }: { from?: string }) {
  usePageTitle('Sign in');
  const { hasRail, gutter } = useWidth();
  const { state } = useSession();
  // The one way on: where somebody is sent only once the whole application knows who they are.
  if (state.kind === 'signedIn') return <Redirect href={whereTo(from)} />;
  return (
    <View role="main" style={{ flexGrow: 1, flexDirection: hasRail ? 'row' : 'column' }}>
      <StillLineScene isWide={hasRail} />
      <View style={{ flex: hasRail ? 1 : undefined, alignItems: 'center', justifyContent: 'center' }}>
        <View style={{ width: '100%', maxWidth: 440, padding: gutter, gap: SPACE.three }}>
          <SignInForm />
        </View>
      </View>
    </View>
  );
}

function SignInForm() {
  const { signIn } = useSession();
  const [typed, setTyped] = useState<Credentials>({ email: '', password: '' });
  const [missing, setMissing] = useState<Partial<Credentials>>({});
  const opening = useMutation({ mutationFn: signIn });
  const submit = (credentials: Credentials) => {
    setTyped(credentials);
    const gaps = missingIn(credentials);
    setMissing(gaps);
    if (Object.keys(gaps).length === 0) opening.mutate(credentials);
  };
  return (
    <FormBox style={{ gap: SPACE.two }}>
      <Words size="head" weight="medium" level={1}>
        Sign in
      </Words>
      {opening.error && (
        <Words tone="danger" role="alert">
          {opening.error.message}
        </Words>
      )}
      <TextField
        label="E-mail"
        kind="email"
        autoComplete="email"
        value={typed.email}
        error={missing.email}
        onChange={(email) => setTyped({ ...typed, email })}
        onSubmit={() => submit(typed)}
      />
      <TextField
        label="Password"
        kind="password"
        autoComplete="current-password"
        value={typed.password}
        error={missing.password}
        onChange={(password) => setTyped({ ...typed, password })}
        onSubmit={() => submit(typed)}
      />
      <Button kind="main" onPress={() => submit(typed)} busy={opening.isPending}>
        Sign in
      </Button>
      <DemoSignIns onChoose={submit} isBusy={opening.isPending} />
    </FormBox>
  );
}

function missingIn({ email, password }: Credentials): Partial<Credentials> {
  return {
    ...(/^\S+@\S+$/.test(email.trim()) ? {} : { email: 'Type the e-mail address you were invited with.' }),
    ...(password === '' ? { password: 'Type your password.' } : {}),
  };
}
