/**
 * The worker: counts the units that it is given.
 *
 * @module
 */
import { openCounter, type PartOf } from "./counters.ts";
import type { Job } from "./counters.ts";
import type { Counter } from "./job.ts";
import type { Answer, Order } from "./run_on_workers.ts";

/** The side of a worker that its own code sees. */
interface WorkerScope {
  onmessage: ((event: MessageEvent<Order>) => void) | null;
  postMessage(answer: Answer): void;
}

/** Answers every order in turn; a fault is told instead of thrown, so that the other side can name it. */
function serveOrders(scope: WorkerScope): void {
  let counter: Counter<PartOf<Job>> | null = null;
  scope.onmessage = ({ data }) => {
    try {
      if ("job" in data) counter = openCounter(data.job, data.kernel);
      else if (counter === null) throw new Error("A unit came before its job");
      else if ("finish" in data) scope.postMessage({ part: counter.finish() });
      else {
        for (const _ of counter.run(data.unit));
        scope.postMessage({ done: data.unit });
      }
    } catch (error) {
      scope.postMessage({ fault: String(error) });
    }
  };
}

serveOrders(self as unknown as WorkerScope);
