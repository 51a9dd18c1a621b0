import {
  absolutePressure,
  amount,
  bareUnit,
  block,
  identifier,
  integer,
  quantity,
  range,
  required,
  sentence,
  standard,
  tuple,
} from "./build.ts";
import type { Limits, UnitChoice } from "./kind.ts";

const POSITIVE: Limits = { above: "0" };
const NOT_NEGATIVE: Limits = { atLeast: "0" };
const BETWEEN_0_AND_1: Limits = { atLeast: "0", atMost: "1" };

const bare = (limits: Limits = {}) => quantity(bareUnit, limits);
const leaf = (unit: UnitChoice = bareUnit, limits: Limits = {}) => ({ units: [unit], limits });

const length = amount("mm", "m");
const area = amount("mm2", "m2");
const volume = amount("l", "m3");
const time = amount("ms", "s");
const flow = amount("kg/s");
const pressureLevel: UnitChoice = { ...absolutePressure("Pa"), gauge: "against_standard_atmosphere" };

const pressureSensor = block({
  time_constant: required(quantity(time, NOT_NEGATIVE), "lag of the sensor", "8 ms"),
  noise: required(quantity(amount("Pa"), NOT_NEGATIVE), "one standard deviation", "400 Pa"),
  range: required(range(pressureLevel), "what the converter spans", "0 kPa abs to 400 kPa abs"),
  bits: required(integer(1, 32), "resolution of the converter over the range", "12"),
  bias: standard(quantity(amount("Pa")), "0 Pa", "constant error"),
});
const temperatureSensor = block({
  time_constant: required(quantity(time, NOT_NEGATIVE), "lag of the sensor", "3 s"),
  step: required(quantity(amount("K"), NOT_NEGATIVE), "smallest change it shows", "0.5 K"),
});
const lossCoefficient = quantity(amount("Pa2*s2/(kg2*K)"), NOT_NEGATIVE);

export const PLANT_BLOCK = block({
  name: required(identifier, "name of the engine", "skarn24"),
  description: standard(sentence, '""', "one sentence about the engine", "invented four-cylinder, one turbo"),
  turbo: required(
    block({
      count: required(integer(1, 8), "identical turbochargers in parallel; their values are per turbo", "1"),
      speed_limit: required(quantity(amount("rpm", "rad/s"), POSITIVE), "mechanical limit", "165 krpm"),
    }),
    "how many turbochargers, and their limit",
    "{ count: 1, speed_limit: 165 krpm }",
  ),
  engine: required(
    block({
      displacement: required(quantity(volume, POSITIVE), "swept volume of all cylinders", "2.4 l"),
      compression_ratio: required(bare({ above: "1" }), "of the cylinder", "9.5"),
      volumetric_efficiency: required(
        tuple<3>(leaf(), leaf(amount("s/rad")), leaf(amount("s2/rad2"))),
        "constant, linear and square part over engine speed in rad/s",
        "[0.676, 1.047e-3 s/rad, -1.0e-6 s2/rad2]",
      ),
      stoichiometric_ratio: required(bare(POSITIVE), "mass of air to mass of fuel", "14.6"),
      lambda: required(bare(POSITIVE), "excess-air ratio", "0.85"),
      indicated_efficiency: required(bare({ above: "0", atMost: "1" }), "of the cycle", "0.33"),
      heating_value: required(quantity(amount("MJ/kg", "J/kg"), POSITIVE), "of the fuel", "43 MJ/kg"),
      friction: required(
        tuple<3>(
          leaf(amount("N*m"), NOT_NEGATIVE),
          leaf(amount("N*m*s"), NOT_NEGATIVE),
          leaf(amount("N*m*s2"), NOT_NEGATIVE),
        ),
        "constant, linear and square part over engine speed in rad/s",
        "[14 N*m, 0.01 N*m*s, 6e-5 N*m*s2]",
      ),
    }),
    "cylinders and torque",
    "{ displacement: 2.4 l }",
  ),
  volumes: required(
    block({
      boost: required(quantity(volume, POSITIVE), "compressor to throttle", "10 l"),
      intake: required(quantity(volume, POSITIVE), "intake manifold", "6 l"),
      exhaust: required(quantity(volume, POSITIVE), "exhaust manifold, per turbo", "3 l"),
    }),
    "volumes that store gas",
    "{ boost: 10 l, intake: 6 l, exhaust: 3 l }",
  ),
  losses: required(
    block({
      air_filter: required(
        lossCoefficient,
        "pressure loss times density over mass flow squared",
        "8.7e6 Pa2*s2/(kg2*K)",
      ),
      intercooler: required(lossCoefficient, "as air_filter", "5.0e7 Pa2*s2/(kg2*K)"),
      exhaust: required(lossCoefficient, "as air_filter", "1.0e7 Pa2*s2/(kg2*K)"),
    }),
    "flow losses",
    "{ air_filter: 8.7e6 Pa2*s2/(kg2*K) }",
  ),
  compressor: required(
    block({
      tip_radius: required(quantity(length, POSITIVE), "of the wheel's outlet", "31 mm"),
      reference_tip_speed: required(
        quantity(amount("m/s"), POSITIVE),
        "speed the map is normalised by",
        "500 m/s",
      ),
      peak_head: required(bare(POSITIVE), "head coefficient at the top of a speed line", "0.62"),
      shutoff_head: required(bare(POSITIVE), "head coefficient at zero flow", "0.42"),
      mach_loss: required(bare(NOT_NEGATIVE), "loss of head over the fourth power of tip speed", "0.14"),
      peak_flow: required(
        tuple<2>(leaf(flow), leaf(flow)),
        "flow of the top of the speed line: linear and square part",
        "[0.005 kg/s, 0.09 kg/s]",
      ),
      choke_flow: required(
        tuple<3>(leaf(flow), leaf(flow), leaf(flow)),
        "choke flow: constant, linear and square part",
        "[0.14 kg/s, 0.33 kg/s, -0.02 kg/s]",
      ),
      choke_pressure_ratio: required(tuple<2>(leaf(), leaf()), "constant and square part", "[0.3, 0.85]"),
      tangent_from: required(
        bare({ above: "0", below: "1" }),
        "where the speed line goes on as its tangent",
        "0.98",
      ),
      reverse_flow: required(bare(NOT_NEGATIVE), "reverse flow in surge over choke flow", "0.35"),
      flow_time_constant: required(quantity(time, POSITIVE), "lag of flow behind the map", "4 ms"),
      work_slip: required(bare(POSITIVE), "work coefficient at zero flow", "0.90"),
      work_slope: required(quantity(amount("s/kg")), "fall of the work coefficient over flow", "0.85 s/kg"),
      map_reference: required(
        tuple<2>(leaf({ ...amount("K"), level: "temperature" }, POSITIVE), leaf(pressureLevel, POSITIVE)),
        "temperature and pressure of the map",
        "[298 K, 100 kPa abs]",
      ),
    }),
    "compressor, per turbo",
    "{ tip_radius: 31 mm }",
  ),
  intercooler: required(
    block({
      effectiveness: required(bare(BETWEEN_0_AND_1), "at no flow", "0.86"),
      effectiveness_slope: required(quantity(amount("s/kg"), NOT_NEGATIVE), "fall over flow", "0.45 s/kg"),
      coolant_rise: required(quantity(amount("K")), "coolant above ambient", "4 K"),
      time_constant: required(quantity(time, POSITIVE), "of the charge temperature", "2 s"),
    }),
    "charge-air cooler",
    "{ effectiveness: 0.86 }",
  ),
  inlet: required(
    block({
      mixing_time_constant: required(quantity(time, POSITIVE), "of the inlet temperature", "50 ms"),
      mixing_flow: required(quantity(flow, POSITIVE), "keeps the mixing regular at no flow", "0.002 kg/s"),
    }),
    "compressor inlet",
    "{ mixing_time_constant: 50 ms, mixing_flow: 0.002 kg/s }",
  ),
  intake: required(
    block({ heating: required(quantity(amount("K")), "from boost volume to intake manifold", "6 K") }),
    "intake manifold",
    "{ heating: 6 K }",
  ),
  exhaust: required(
    block({
      temperature_base: required(quantity(amount("K"), POSITIVE), "gas temperature at no flow", "980 K"),
      temperature_rise: required(quantity(amount("K"), NOT_NEGATIVE), "added at full flow", "300 K"),
      temperature_flow: required(quantity(flow, POSITIVE), "flow at half of the rise", "0.06 kg/s"),
      motored_rise: required(quantity(amount("K")), "above intake temperature without fuel", "170 K"),
      wall_flow: required(quantity(flow, NOT_NEGATIVE), "flow at half of the wall exchange", "0.02 kg/s"),
      gas_time_constant: required(quantity(time, POSITIVE), "of the gas temperature", "30 ms"),
      wall_heat_capacity: required(quantity(amount("J/K"), POSITIVE), "of the manifold wall", "2750 J/K"),
      wall_loss: required(quantity(amount("W/K"), NOT_NEGATIVE), "wall to ambient", "8 W/K"),
      outlet_time_constant: required(quantity(time, POSITIVE), "of the turbine outlet pressure", "15 ms"),
    }),
    "exhaust side",
    "{ temperature_base: 980 K }",
  ),
  turbine: required(
    block({
      flow: required(
        quantity(amount("kg*K^0.5/(s*Pa)"), POSITIVE),
        "flow constant of the ellipse law",
        "3.4e-5 kg*K^0.5/(s*Pa)",
      ),
      efficiency: required(bare({ above: "0", atMost: "1" }), "highest", "0.78"),
      tip_radius: required(quantity(length, POSITIVE), "of the wheel's inlet", "28 mm"),
      best_speed_ratio: required(
        bare({ above: "0", below: "2" }),
        "blade speed over gas speed at best efficiency",
        "0.65",
      ),
      linear_above: required(
        bare({ above: "0", below: "1" }),
        "pressure ratio above which flow is linear",
        "0.94",
      ),
    }),
    "turbine, per turbo",
    "{ efficiency: 0.78 }",
  ),
  rotor: required(
    block({
      inertia: required(quantity(amount("kg*m2"), POSITIVE), "of both wheels and shaft", "8.5e-5 kg*m2"),
      friction: required(
        quantity(amount("N*m*s"), NOT_NEGATIVE),
        "bearing torque over speed in rad/s",
        "2.0e-6 N*m*s",
      ),
    }),
    "rotor, per turbo",
    "{ inertia: 8.5e-5 kg*m2, friction: 2.0e-6 N*m*s }",
  ),
  wastegate: required(
    block({
      leak_area: required(quantity(area, NOT_NEGATIVE), "effective area when closed", "4 mm2"),
      port_area: required(quantity(area, POSITIVE), "effective area of the port", "700 mm2"),
      curtain_factor: required(bare(POSITIVE), "curtain area at full lift over port area", "2"),
      stall_pressure: required(
        quantity(amount("kPa", "Pa"), POSITIVE),
        "pressure difference that stalls the motor",
        "320 kPa",
      ),
      dead_zone: required(bare(BETWEEN_0_AND_1), "position error that friction hides", "0.004"),
      time_constant: required(quantity(time, POSITIVE), "of the position servo", "30 ms"),
      rate: required(quantity(amount("1/s"), POSITIVE), "strokes per second without load", "8 1/s"),
    }),
    "wastegate and its electric actuator, per turbo",
    "{ port_area: 700 mm2 }",
  ),
  throttle: required(
    block({
      leak_area: required(quantity(area, NOT_NEGATIVE), "effective area when closed", "22 mm2"),
      area: required(quantity(area, POSITIVE), "effective area when open", "2600 mm2"),
      time_constant: required(quantity(time, POSITIVE), "of the position servo", "40 ms"),
      rate: required(quantity(amount("1/s"), POSITIVE), "strokes per second at most", "12 1/s"),
    }),
    "throttle",
    "{ area: 2600 mm2 }",
  ),
  bypass: required(
    block({
      area: required(quantity(area, NOT_NEGATIVE), "effective area when open", "600 mm2"),
      time_constant: required(quantity(time, POSITIVE), "of the valve", "20 ms"),
    }),
    "compressor bypass valve",
    "{ area: 600 mm2, time_constant: 20 ms }",
  ),
  vehicle: required(
    block({
      load: required(
        tuple<2>(leaf(amount("N*m")), leaf(amount("N*m*s2"), NOT_NEGATIVE)),
        "torque at the crankshaft: constant part, part over speed squared",
        "[30 N*m, 3e-4 N*m*s2]",
      ),
      inertia: required(
        quantity(amount("kg*m2"), POSITIVE),
        "engine and vehicle at the crankshaft",
        "1.6 kg*m2",
      ),
    }),
    "what the engine turns when its speed is free",
    "{ load: [30 N*m, 3e-4 N*m*s2], inertia: 1.6 kg*m2 }",
  ),
  sensors: required(
    block({
      boost_pressure: required(pressureSensor, "upstream of the throttle", "{ time_constant: 8 ms }"),
      ambient_pressure: required(pressureSensor, "of the weather", "{ time_constant: 100 ms }"),
      manifold_pressure: required(pressureSensor, "downstream of the throttle", "{ time_constant: 8 ms }"),
      turbo_speed: required(
        block({
          pulses_per_revolution: required(integer(1, 64), "of the pick-up", "6"),
          window: required(quantity(time, POSITIVE), "pulses are counted over this time", "10 ms"),
        }),
        "turbo speed pick-up",
        "{ pulses_per_revolution: 6, window: 10 ms }",
      ),
      charge_temperature: required(
        temperatureSensor,
        "in the boost volume",
        "{ time_constant: 3 s, step: 0.5 K }",
      ),
      inlet_temperature: required(
        temperatureSensor,
        "at the compressor inlet",
        "{ time_constant: 3 s, step: 0.5 K }",
      ),
      engine_speed: required(
        block({
          step: required(quantity(amount("rpm", "rad/s"), NOT_NEGATIVE), "smallest change it shows", "1 rpm"),
        }),
        "engine speed",
        "{ step: 1 rpm }",
      ),
    }),
    "sensors",
    "{ turbo_speed: { pulses_per_revolution: 6, window: 10 ms } }",
  ),
  validity: required(
    block({
      engine_speed: required(
        range(amount("rpm", "rad/s"), NOT_NEGATIVE),
        "believed from, to",
        "1000 rpm to 7500 rpm",
      ),
      pressure_ratio: required(range(bareUnit, POSITIVE), "of the compressor", "1 to 3.5"),
      tip_speed: required(range(amount("m/s"), NOT_NEGATIVE), "of the compressor wheel", "0 m/s to 560 m/s"),
    }),
    "where the plant is believed; a run that leaves it is flagged",
    "{ engine_speed: 1000 rpm to 7500 rpm, pressure_ratio: 1 to 3.5, tip_speed: 0 m/s to 560 m/s }",
  ),
});
