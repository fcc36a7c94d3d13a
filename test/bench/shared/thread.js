// A thread does not inherit how its parent reads TypeScript: it learns it here, then runs the file it was asked for.
import { workerData } from 'node:worker_threads';
import { register } from 'tsx/esm/api';

register();
await import(workerData.file);
