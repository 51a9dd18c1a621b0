// npm test: prepares the clone, installs what the tests need where it may, runs vitest and counts honestly.
//   npm test                          everything
//   npm test -- test/spec             the tests under a path; other arguments go to vitest too
//   npm test -- --without clang       excuses the tests that need clang; repeatable
//   npm test -- --update hold-loop    accepts new golden files of one case
import { existsSync, mkdirSync, readFileSync, rmSync } from "node:fs";
import { join, relative } from "node:path";
import { prepare, root, run } from "./prepare.mjs";
import { missingTools, toolNames } from "./tools.mjs";

const RESULTS = join(root, "out/test-results.json");

/** Takes `--name value` pairs out of the arguments. */
function takeOption(args, name) {
  const values = [];
  const rest = [];
  for (let i = 0; i < args.length; i++) {
    if (args[i] !== name) rest.push(args[i]);
    else if (args[i + 1] === undefined) usage(`${name} needs a value`);
    else values.push(args[++i]);
  }
  return { values, rest };
}

function usage(problem) {
  console.error(`npm test: ${problem}`);
  process.exit(2);
}

/** Names of tests that ended in one of the states; a file that could not be loaded counts as one test. */
function testsIn(results, states) {
  return results.testResults.flatMap((file) => {
    const name = relative(root, file.name);
    if (file.assertionResults.length === 0 && states.includes(file.status)) return [`${name} (whole file)`];
    return file.assertionResults
      .filter((one) => states.includes(one.status))
      .map((one) => `${name} > ${one.fullName}`);
  });
}

const without = takeOption(process.argv.slice(2), "--without");
const update = takeOption(without.rest, "--update");
for (const name of without.values) {
  if (!toolNames.includes(name)) usage(`--without knows ${toolNames.join(", ")}, not ${name}`);
}

prepare();
const unexcused = () => missingTools().filter((name) => !without.values.includes(name));
if (unexcused().length > 0) run("bash", [join(root, ".ci/set-up")]);
const lacking = unexcused();

mkdirSync(join(root, "out"), { recursive: true });
rmSync(RESULTS, { force: true });
const vitest = join(root, "node_modules/vitest/vitest.mjs");
const reporters = ["--reporter=default", "--reporter=json", `--outputFile.json=${RESULTS}`];
const code = run(process.execPath, [vitest, "run", ...reporters, ...update.rest], {
  SPOOLWRIGHT_WITHOUT: [...without.values, ...lacking].join(","),
  SPOOLWRIGHT_UPDATE: update.values.join(","),
});

if (!existsSync(RESULTS)) {
  console.log("vitest wrote no results\n0 passed, 1 failed");
  process.exit(1);
}
const results = JSON.parse(readFileSync(RESULTS, "utf8"));
const passed = testsIn(results, ["passed"]).length;
let failed = testsIn(results, ["failed"]).length;
const notRun = testsIn(results, ["skipped", "pending", "todo", "disabled"]);

for (const name of notRun) console.log(`not run: ${name}`);
if (without.values.length > 0) console.log(`without: ${without.values.join(", ")}, as asked`);
if (lacking.length > 0) {
  console.log(`failed: ${lacking.join(", ")} missing; install with .ci/set-up or excuse with --without NAME`);
  failed += lacking.length;
}
if (code !== 0 && failed === 0) {
  console.log("failed: vitest reported an error outside any test; see above");
  failed += 1;
}
console.log(`${passed} passed, ${failed} failed`);
process.exit(failed === 0 ? 0 : 1);
