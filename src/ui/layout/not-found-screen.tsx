import { useRouter } from 'expo-router';

import { Button } from '../button';
import { Words } from '../words';
import { Screen } from './screen';
import { Shell } from './shell';
import { Empty } from './states';

export function NotFoundScreen() {
  const router = useRouter();
  return (
    <Shell fieldId={null}>
      <Screen title="Page not found">
        <Empty title="There is no page at this address">
          <Words tone="quiet" align="center">
            It may have been mistyped, or the page has moved.
          </Words>
          <Button kind="main" onPress={() => router.replace('/')}>
            Go to your fields
          </Button>
        </Empty>
      </Screen>
    </Shell>
  );
}
