import type { TraceSignal } from "../../spec/index.ts";
import type { ControllerPort } from "../controller-port.ts";
import type { PlantFlows } from "../plant/plant-flows.ts";
import type { PlantState } from "../plant/plant-state.ts";
import type { Trace } from "../trace.ts";

const RPM_PER_RADIAN = 9.549296585513721;

/** The arrays of a trace in one fixed shape, so that recording stays fast whatever was asked for. */
export type Recorder = Record<TraceSignal, Float64Array | undefined> & {
  readonly mode: Uint8Array | undefined;
};

export function newRecorder(trace: Trace): Recorder {
  const { signals } = trace;
  return {
    boost_pressure: signals.boost_pressure,
    boost_measured: signals.boost_measured,
    boost_wanted: signals.boost_wanted,
    boost_target: signals.boost_target,
    manifold_pressure: signals.manifold_pressure,
    exhaust_pressure: signals.exhaust_pressure,
    ambient_pressure: signals.ambient_pressure,
    turbo_speed: signals.turbo_speed,
    turbo_speed_measured: signals.turbo_speed_measured,
    engine_speed: signals.engine_speed,
    accelerator: signals.accelerator,
    wastegate_opening: signals.wastegate_opening,
    wastegate_command: signals.wastegate_command,
    torque_limit: signals.torque_limit,
    compressor_flow: signals.compressor_flow,
    engine_torque: signals.engine_torque,
    tripped: signals.tripped,
    guard_active: signals.guard_active,
    fail_safe: signals.fail_safe,
    mode: trace.mode,
  };
}

/** Writes sample `at`: the plant at that millisecond, what the controller read and commands from then on. */
export function recordSample(
  recorder: Recorder,
  at: number,
  state: PlantState,
  flows: PlantFlows,
  port: ControllerPort,
): void {
  recordPlant(recorder, at, state, flows);
  recordController(recorder, at, port);
}

function recordPlant(recorder: Recorder, at: number, state: PlantState, flows: PlantFlows): void {
  if (recorder.boost_pressure) recorder.boost_pressure[at] = state.boostPressure * 1e-3;
  if (recorder.manifold_pressure) recorder.manifold_pressure[at] = state.intakePressure * 1e-3;
  if (recorder.exhaust_pressure) recorder.exhaust_pressure[at] = state.exhaustPressure * 1e-3;
  if (recorder.turbo_speed) recorder.turbo_speed[at] = state.turboSpeed * RPM_PER_RADIAN;
  if (recorder.engine_speed) recorder.engine_speed[at] = state.engineSpeed * RPM_PER_RADIAN;
  if (recorder.wastegate_opening) recorder.wastegate_opening[at] = state.wastegateOpening;
  if (recorder.compressor_flow) recorder.compressor_flow[at] = state.compressorFlow;
  if (recorder.engine_torque) recorder.engine_torque[at] = flows.engineTorque;
}

function recordController(recorder: Recorder, at: number, port: ControllerPort): void {
  const { input, output } = port;
  if (recorder.boost_measured) recorder.boost_measured[at] = input.boostPressureKpa;
  if (recorder.ambient_pressure) recorder.ambient_pressure[at] = input.ambientPressureKpa;
  if (recorder.turbo_speed_measured) recorder.turbo_speed_measured[at] = input.turboSpeedRpm;
  if (recorder.accelerator) recorder.accelerator[at] = input.acceleratorRatio;
  if (recorder.boost_wanted) recorder.boost_wanted[at] = output.boostWantedKpa;
  if (recorder.boost_target) recorder.boost_target[at] = output.boostTargetKpa;
  if (recorder.wastegate_command) recorder.wastegate_command[at] = output.wastegateCommandRatio;
  if (recorder.torque_limit) recorder.torque_limit[at] = output.torqueLimitRatio;
  if (recorder.tripped) recorder.tripped[at] = output.tripped ? 1 : 0;
  if (recorder.guard_active) recorder.guard_active[at] = output.guardActive ? 1 : 0;
  if (recorder.fail_safe) recorder.fail_safe[at] = output.failSafe ? 1 : 0;
  if (recorder.mode) recorder.mode[at] = output.mode;
}
