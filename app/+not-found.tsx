import { NotFoundScreen } from '@/ui/layout/not-found-screen';

export default function NotFoundRoute() {
  return <NotFoundScreen />;
}
