#!/usr/bin/env node
// `npm start`: set-up where needed, then the main job (`fairlead` without arguments, or with those given).
import { build, dependencies, setUp } from './set-up.js';

await setUp(dependencies, build);
await import('./fairlead.js');
