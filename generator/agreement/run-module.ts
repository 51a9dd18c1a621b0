import type { Value } from "../interpret/operations.ts";
import type { Layout } from "../layout/layout.ts";
import type { StructObject } from "../layout/objects.ts";
import type { ControllerModule } from "../run/controller-module.ts";
import { type FrameLayout, frameLayout, RUN_FAST, RUN_SLOW, type Word } from "./frames.ts";
import type { Frames } from "./hostile-inputs.ts";
import { newWords, type WordBuffer } from "./word-buffer.ts";

/** What a target says about a run; equal bytes mean equal behaviour. */
export interface Recording {
  /** Result of the calibration check, the state after initialisation, then one dump per frame, then the counts. */
  readonly words: WordBuffer;
}

/** Words of a recording: check, initial dump, dumps of the frames, steps run. */
export const recordingWords = (layout: FrameLayout, frames: number): number =>
  1 + layout.dump.length * (frames + 1) + 2;

type Objects = Record<string, StructObject>;

interface Slot {
  readonly holder: StructObject | number[];
  readonly key: string | number;
  readonly type: Word["type"];
  readonly members: readonly string[];
}

const slotsOf = (module: ControllerModule, objects: Objects, words: readonly Word[]): readonly Slot[] =>
  words.map(({ struct, path, element, type }) => {
    const names = path[module.naming];
    const down = element === undefined ? names.slice(0, -1) : names;
    const holder = down.reduce<StructObject>((outer, name) => outer[name] as StructObject, objects[struct]);
    const members =
      type.kind === "enum"
        ? (module.layout.enumerations.find(({ name }) => name === type.name)?.members ?? [])
        : [];
    return { holder, key: element ?? names[names.length - 1], type, members };
  });

const read = ({ holder, key }: Slot): Value => (holder as StructObject)[key] as Value;

const write = ({ holder, key }: Slot, value: Value): void => {
  (holder as StructObject)[key] = value;
};

const store = (words: WordBuffer, index: number, slot: Slot): void => {
  const value = read(slot);
  switch (slot.type.kind) {
    case "real":
      words.setReal(index, value as number);
      break;
    case "count":
      words.setWhole(index, value as number);
      break;
    case "flag":
      words.setWhole(index, value ? 1 : 0);
      break;
    case "enum":
      words.setWhole(index, slot.members.indexOf(value as string));
  }
};

const load = (words: WordBuffer, index: number, slot: Slot): void => {
  switch (slot.type.kind) {
    case "real":
      write(slot, words.real(index));
      break;
    case "count":
      write(slot, words.whole(index));
      break;
    case "flag":
      write(slot, words.whole(index) !== 0);
      break;
    case "enum":
      write(slot, slot.members[words.whole(index)]);
  }
};

const newObjects = (module: ControllerModule): Objects =>
  Object.fromEntries(
    module.layout.structs
      .filter(({ outer }) => outer)
      .map(({ name, role }) => [
        name,
        role === "calibration" ? module.createCalibration() : module.create(name),
      ]),
  );

/** The entry of a kind, in the layout's order: init, slow step, fast step, check. */
export const entryNames = (layout: Layout) => {
  const named = (kind: string) =>
    layout.entries.filter((each) => each.kind === kind).map((each) => each.function);
  const [slow, fast] = named("step");
  return { init: named("init")[0], slow, fast, check: named("check")[0] };
};

/** The specified calibration as words, as this module creates it. */
export const specifiedCalibration = (module: ControllerModule): WordBuffer => {
  const layout = frameLayout(module.layout);
  const words = newWords(layout.calibration.length, layout.wordBytes);
  slotsOf(module, newObjects(module), layout.calibration).forEach((slot, i) => {
    store(words, i, slot);
  });
  return words;
};

/** Runs frames through a controller in this process and records every output, state and exchange field. */
export const runModule = (module: ControllerModule, calibration: WordBuffer, frames: Frames): Recording => {
  const layout = frameLayout(module.layout);
  const objects = newObjects(module);
  const names = entryNames(module.layout);
  const bind = (entry: string | undefined) => (entry === undefined ? () => -1 : module.bind(entry, objects));
  const [init, slow, fast, check] = [names.init, names.slow, names.fast, names.check].map(bind);
  slotsOf(module, objects, layout.calibration).forEach((slot, i) => {
    load(calibration, i, slot);
  });
  const inputs = slotsOf(module, objects, layout.input);
  const dumps = slotsOf(module, objects, layout.dump);
  const words = newWords(recordingWords(layout, frames.count), layout.wordBytes);
  let at = 1;
  const dump = (): void => {
    for (const slot of dumps) {
      store(words, at++, slot);
    }
  };
  words.setWhole(0, check() as number);
  init();
  dump();
  const ran = { fast: 0, slow: 0 };
  for (let frame = 0; frame < frames.count; frame++) {
    const start = frame * (1 + inputs.length);
    const run = frames.words.whole(start);
    for (let i = 0; i < inputs.length; i++) {
      load(frames.words, start + 1 + i, inputs[i]);
    }
    if (run & RUN_FAST && names.fast !== undefined) {
      fast();
      ran.fast += 1;
    }
    if (run & RUN_SLOW) {
      slow();
      ran.slow += 1;
    }
    dump();
  }
  words.setWhole(at, ran.fast);
  words.setWhole(at + 1, ran.slow);
  return { words };
};
