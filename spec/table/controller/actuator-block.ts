import { amount, block, quantity, range, required, standard, words } from "../build.ts";
import { OPENING, POSITIVE, ratio } from "./common.ts";

export const ACTUATOR_BLOCK = block(
  {
    opening: standard(range(ratio, OPENING), "0 % to 100 %", "what the actuator may be asked for"),
    slew: required(
      block({
        open: required(quantity(amount("%/s", "1/s"), POSITIVE), "fastest opening", "900 %/s"),
        close: required(quantity(amount("%/s", "1/s"), POSITIVE), "fastest closing", "500 %/s"),
      }),
      "how fast the command may move",
      "{ open: 900 %/s, close: 500 %/s }",
    ),
    safe_opening: standard(quantity(ratio, OPENING), "100 %", "at start and in fail-safe"),
    rest_opening: standard(quantity(ratio, OPENING), "30 %", "while no boost is wanted"),
    on_power_loss: standard(words("open", "closed", "hold"), "open", "where the valve goes without power"),
  },
  { reserved: ["position_loop"] },
);
