import { weighBag, type Answer, type Job } from './bag-weighed.ts';

/** The bag is weighed beside the page, so that ten thousand pieces do not hold it up. */
const scope = self as unknown as { onmessage: (event: MessageEvent<Job>) => void; postMessage(answer: Answer): void };

scope.onmessage = ({ data }) => {
	scope.postMessage(weighBag(data, (done) => scope.postMessage({ done })));
};
