import { Home } from '@/features/fields/home';

export default function HomeRoute() {
  return <Home />;
}
