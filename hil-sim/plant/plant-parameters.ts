import type { PlantSpec } from "../../spec/index.ts";

/** A plant's parameters, flat, SI; made by `plantParameters` or `copyPlantParameters` only, so that all share one shape. */
export type PlantParameters = ReturnType<typeof flatParameters>;
export type ParameterName = keyof PlantParameters;

/** Flat parameters of a plant file; symbols and plant keys: README.md. */
export function plantParameters(spec: PlantSpec): PlantParameters {
  return copyPlantParameters(flatParameters(spec));
}

/**
 * A copy that can be changed; all values finite. By way of JSON, which keeps every bit of a finite number and lays all
 * fields out in the object itself, where a spread puts most behind a pointer. Originals are copies too, since the
 * step is compiled for one layout.
 */
export function copyPlantParameters(source: PlantParameters): PlantParameters {
  return JSON.parse(JSON.stringify(source)) as PlantParameters;
}

function flatParameters(spec: PlantSpec) {
  const { engine, volumes, losses, compressor, intercooler, exhaust, turbine, wastegate, throttle } = spec;
  return {
    turboCount: spec.turbo.count,
    turboSpeedLimit: spec.turbo.speedLimit,
    displacement: engine.displacement,
    compressionRatio: engine.compressionRatio,
    volumetricEfficiencyBase: engine.volumetricEfficiency[0],
    volumetricEfficiencyLinear: engine.volumetricEfficiency[1],
    volumetricEfficiencyQuadratic: engine.volumetricEfficiency[2],
    stoichiometricRatio: engine.stoichiometricRatio,
    lambda: engine.lambda,
    indicatedEfficiency: engine.indicatedEfficiency,
    heatingValue: engine.heatingValue,
    frictionBase: engine.friction[0],
    frictionLinear: engine.friction[1],
    frictionQuadratic: engine.friction[2],
    boostVolume: volumes.boost,
    intakeVolume: volumes.intake,
    exhaustVolume: volumes.exhaust,
    airFilterLoss: losses.airFilter,
    intercoolerLoss: losses.intercooler,
    exhaustLoss: losses.exhaust,
    compressorRadius: compressor.tipRadius,
    referenceTipSpeed: compressor.referenceTipSpeed,
    peakHead: compressor.peakHead,
    shutoffHead: compressor.shutoffHead,
    machLoss: compressor.machLoss,
    peakFlowLinear: compressor.peakFlow[0],
    peakFlowQuadratic: compressor.peakFlow[1],
    chokeFlowBase: compressor.chokeFlow[0],
    chokeFlowLinear: compressor.chokeFlow[1],
    chokeFlowQuadratic: compressor.chokeFlow[2],
    chokePressureRatioBase: compressor.chokePressureRatio[0],
    chokePressureRatioQuadratic: compressor.chokePressureRatio[1],
    tangentFrom: compressor.tangentFrom,
    reverseFlow: compressor.reverseFlow,
    flowTimeConstant: compressor.flowTimeConstant,
    workSlip: compressor.workSlip,
    workSlope: compressor.workSlope,
    mapTemperature: compressor.mapReference[0],
    mapPressure: compressor.mapReference[1],
    intercoolerEffectiveness: intercooler.effectiveness,
    intercoolerEffectivenessSlope: intercooler.effectivenessSlope,
    coolantRise: intercooler.coolantRise,
    intercoolerTimeConstant: intercooler.timeConstant,
    mixingTimeConstant: spec.inlet.mixingTimeConstant,
    mixingFlow: spec.inlet.mixingFlow,
    intakeHeating: spec.intake.heating,
    exhaustTemperatureBase: exhaust.temperatureBase,
    exhaustTemperatureRise: exhaust.temperatureRise,
    exhaustTemperatureFlow: exhaust.temperatureFlow,
    motoredRise: exhaust.motoredRise,
    wallFlow: exhaust.wallFlow,
    gasTimeConstant: exhaust.gasTimeConstant,
    wallHeatCapacity: exhaust.wallHeatCapacity,
    wallLoss: exhaust.wallLoss,
    outletTimeConstant: exhaust.outletTimeConstant,
    turbineFlow: turbine.flow,
    turbineEfficiency: turbine.efficiency,
    turbineRadius: turbine.tipRadius,
    bestSpeedRatio: turbine.bestSpeedRatio,
    turbineLinearAbove: turbine.linearAbove,
    rotorInertia: spec.rotor.inertia,
    rotorFriction: spec.rotor.friction,
    wastegateLeakArea: wastegate.leakArea,
    wastegatePortArea: wastegate.portArea,
    curtainFactor: wastegate.curtainFactor,
    stallPressure: wastegate.stallPressure,
    wastegateDeadZone: wastegate.deadZone,
    wastegateTimeConstant: wastegate.timeConstant,
    wastegateRate: wastegate.rate,
    throttleLeakArea: throttle.leakArea,
    throttleArea: throttle.area,
    throttleTimeConstant: throttle.timeConstant,
    throttleRate: throttle.rate,
    bypassArea: spec.bypass.area,
    bypassTimeConstant: spec.bypass.timeConstant,
    vehicleLoadBase: spec.vehicle.load[0],
    vehicleLoadQuadratic: spec.vehicle.load[1],
    vehicleInertia: spec.vehicle.inertia,
  };
}
