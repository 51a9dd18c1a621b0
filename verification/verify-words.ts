/** What every campaign takes for granted; the report prints these. */
export const ASSUMPTIONS: readonly string[] = [
  "The plant is a mean-value model with the parameters of the plant file: no pulses, no knock, no cylinder events.",
  "Plant parameters scatter uniformly and independently within the stated ranges; free values of scenarios likewise.",
  "The bound of the violation probability holds for these distributions, with 95 % confidence for each line alone, over the random runs that exercised the requirement.",
  "Corner runs and the runs spent on shrinking are counted apart and enter no bound.",
  "Whether a plant can follow a target is decided by the steady solver on that run's plant, at the engine speed and accelerator at the end of the command, without faults; the controller has no say.",
  "Reaching a target is asked wherever some gate opening holds it; overshoot, settling and steady error also need 2.5 % of room on either side of it, and a start from a target that was held or asked for no boost.",
  "The vehicle side (throttle, fuel, bypass) answers within the millisecond, apart from the plant's own delays.",
  "On the compressor map the charge is taken to be 30 K warmer than ambient; 20 K more or less moves the pressure ratio by about 0.2 %.",
];

export const CAUTIONS: readonly string[] = [
  "Tested, not proved: a requirement that holds in every run may still be violated by a run that was not made.",
  "A model is not the engine: check on the test bench before the car.",
  "Prototype use only. Keep an independent mechanical or electrical overspeed and overboost protection; local rules and a qualified engineer decide.",
];
