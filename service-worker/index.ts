import { version } from '$service-worker';
console.log(version);
