import assert from "node:assert/strict";
import { permuteMoran } from "../../lib/inference/permute_global.ts";
import { permuteLocalMoran } from "../../lib/inference/permute_local.ts";
import { gridWeights, normalNumbers, unequalWeights } from "../support/maps.ts";

/** Starts real workers, and keeps an account of how many were started and ended. */
function countingStarter() {
  const account = { started: 0, ended: 0 };
  const startWorker = () => {
    account.started++;
    const worker = new Worker(new URL("../../lib/inference/count_worker.ts", import.meta.url), {
      type: "module",
    });
    const terminate = worker.terminate.bind(worker);
    worker.terminate = () => {
      account.ended++;
      terminate();
    };
    return worker;
  };
  return { account, startWorker };
}

const values = normalNumbers(4900, "workers");
const equal = gridWeights(70, 70, { corners: true });
const unequal = unequalWeights(equal, "workers");

const RUNS = {
  "permuteMoran()": (options: object) =>
    permuteMoran(values, [equal, unequal], { permutations: 300, ...options }),
  "permuteLocalMoran() with equal weights": (options: object) =>
    permuteLocalMoran(values, equal, { permutations: 550_000, ...options }),
  "permuteLocalMoran() with unequal weights": (options: object) =>
    permuteLocalMoran(values, unequal, { permutations: 999, ...options }),
};

for (const [name, run] of Object.entries(RUNS)) {
  Deno.test(`${name} gives the same bytes on 1, 2, 3 and 8 workers and ends them all`, async () => {
    const alone = await run({ workers: 1 });
    for (const workers of [2, 3, 8]) {
      const { account, startWorker } = countingStarter();
      assert.deepEqual(await run({ workers, startWorker }), alone);
      const most = name.includes("unequal") ? 5 : 8; // 4,900 areas make five units
      assert.equal(account.started, Math.min(workers, most));
      assert.equal(account.ended, account.started);
    }
  });
}

Deno.test("permuteLocalMoran() starts no worker for little work unless asked to", async () => {
  const { account, startWorker } = countingStarter();
  await permuteLocalMoran(values, equal, { permutations: 999, startWorker });
  assert.equal(account.started, 0);
});

Deno.test("permuteLocalMoran() ends its workers when aborted, soon and with the signal's reason", async () => {
  const { account, startWorker } = countingStarter();
  const controller = new AbortController();
  const shares: number[] = [];
  const run = permuteLocalMoran(values, equal, {
    permutations: 9_999_999,
    workers: 2,
    startWorker,
    signal: controller.signal,
    onProgress: (share) => shares.push(share),
  });
  let abortedAt = 0;
  setTimeout(() => {
    abortedAt = performance.now();
    controller.abort(new Error("changed my mind"));
  }, 250);
  await assert.rejects(run, /changed my mind/);
  assert.ok(performance.now() - abortedAt < 100);
  assert.deepEqual(account, { started: 2, ended: 2 });
  assert.ok(shares.length >= 1);
});

Deno.test("permuteLocalMoran() names the fault of a worker and ends all", async () => {
  let ended = 0;
  const startWorker = () => {
    const source = "self.onmessage = () => postMessage({ fault: 'out of paper' });";
    const worker = new Worker(
      URL.createObjectURL(new Blob([source], { type: "text/javascript" })),
      { type: "module" },
    );
    const terminate = worker.terminate.bind(worker);
    worker.terminate = () => {
      ended++;
      terminate();
    };
    return worker;
  };
  await assert.rejects(
    permuteLocalMoran(values, equal, { workers: 2, startWorker }),
    /out of paper/,
  );
  assert.equal(ended, 2);
});
