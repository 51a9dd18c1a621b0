import { spawnSync } from "node:child_process";
import { existsSync } from "node:fs";
import { resolve } from "node:path";
import { pathToFileURL } from "node:url";
import { beforeAll, describe, expect, it } from "vitest";
import { batchRunner, loadController, requirementsOf, runCampaign } from "../../verification/index.ts";
import { exampleLoop, generatedController } from "./example-loop.ts";

/** Worker threads need JavaScript files: the sources are built aside, once. */
const BUILT = resolve("out/worker-test");
const POOL = `${BUILT}/verification/worker-pool.js`;

const loop = exampleLoop();
const plan = {
  requirements: loop.scenarios.map((scenario) =>
    scenario.name === "steps_up" || scenario.name === "boost_leak"
      ? requirementsOf(loop, scenario).length
      : 0,
  ),
  runs: 45,
  corners: 3,
};

beforeAll(() => {
  spawnSync("npx", ["tsc", "-p", "tsconfig.build.json", "--outDir", BUILT], { encoding: "utf8" });
  if (!existsSync(POOL)) throw new Error("the build made no worker pool");
});

describe("a campaign on worker threads", () => {
  it("gives the same margins to the bit on 1, 2 and 7 threads as in one process", async () => {
    const controller = generatedController(loop);
    const run = batchRunner(loop, await loadController(controller, loop), 1);
    const alone = await runCampaign(plan, async (batch) => run(batch));
    const { startWorkers } = await import(/* @vite-ignore */ pathToFileURL(POOL).href);
    for (const jobs of [1, 2, 7]) {
      const workers = startWorkers({ loop, controller, seed: 1 }, jobs);
      const together = await runCampaign(plan, workers.runBatch);
      await workers.close();
      expect(together, `${jobs} threads`).toEqual(alone);
    }
    expect(alone.simulations).toEqual({ random: 90, corner: 6 });
  });
});
