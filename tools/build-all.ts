import { buildAll } from './build';

/** `npm run build`. */
void buildAll();
