import { array, assert, asyncProperty, integer, record } from "fast-check";
import { describe, expect, it } from "vitest";
import { type Batch, runCampaign } from "../../verification/campaign.ts";

const marginOf = (batch: Batch, row: number, column: number) =>
  1e6 * batch.scenario + 1e3 * (batch.from + row) + column + (batch.kind === "corner" ? 0.5 : 0);

const resultOf = (batch: Batch, columns: number) => ({
  margins: Float64Array.from({ length: batch.count * columns }, (_, k) =>
    marginOf(batch, Math.floor(k / columns), k % columns),
  ),
  leftValidity: batch.kind === "random" ? batch.count : 0,
  clamped: 0,
});

describe("a campaign", () => {
  it("puts every run's margins in the order of runs, whatever the order in which batches end", async () => {
    const plans = record({
      requirements: array(integer({ min: 0, max: 4 }), { maxLength: 4 }),
      runs: integer({ min: 0, max: 70 }),
      corners: integer({ min: 0, max: 30 }),
    });
    await assert(
      asyncProperty(
        plans,
        array(integer({ min: 0, max: 5 }), { minLength: 40, maxLength: 40 }),
        async (plan, waits) => {
          let started = 0;
          let done = 0;
          const runBatch = async (batch: Batch) => {
            for (let turn = waits[started++ % 40]; turn > 0; turn--) await Promise.resolve();
            return resultOf(batch, plan.requirements[batch.scenario]);
          };
          const result = await runCampaign(plan, runBatch, (progress) => {
            expect(progress.done).toBeGreaterThan(done);
            done = progress.done;
            expect(progress.done).toBeLessThanOrEqual(progress.total);
          });
          plan.requirements.forEach((columns, scenario) => {
            const { margins, leftValidity } = result.random[scenario];
            expect(margins).toHaveLength(columns);
            margins.forEach((column, c) => {
              const expected = Array.from({ length: plan.runs }, (_, run) => 1e6 * scenario + 1e3 * run + c);
              expect([...column]).toEqual(expected);
            });
            expect(leftValidity).toBe(columns > 0 ? plan.runs : 0);
          });
          const used = plan.requirements.filter((columns) => columns > 0).length;
          expect(result.simulations).toEqual({ random: used * plan.runs, corner: used * plan.corners });
        },
      ),
      { seed: 19 },
    );
  });

  it("fails when a batch fails", async () => {
    const plan = { requirements: [1], runs: 5, corners: 0 };
    await expect(runCampaign(plan, () => Promise.reject(new Error("lost")))).rejects.toThrow("lost");
  });
});
