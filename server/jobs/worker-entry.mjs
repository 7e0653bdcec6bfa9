// A thread cannot start from TypeScript by itself: this registers the translator, then hands over.
import { register } from 'tsx/esm/api';

register();
await import('./worker.ts');
