import { useLocalSearchParams } from 'expo-router';

import { SignInScreen } from '@/features/sign-in/sign-in-screen';

export default function SignInRoute() {
  const { from } = useLocalSearchParams<{ from?: string }>();
  return <SignInScreen from={from} />;
}
