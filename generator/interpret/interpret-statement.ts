import type { AssignStatement, ForStatement, Statement, SwitchStatement } from "../ir/statement.ts";
import type { StructObject } from "../layout/objects.ts";
import {
  type Frame,
  interpretCall,
  interpretExpression,
  reach,
  reachHolder,
  type Surroundings,
  slotOf,
} from "./interpret-expression.ts";

export type Execute = (frame: Frame) => void;

/** `after` runs after every statement: tests let another task interrupt there. */
export interface StatementSurroundings extends Surroundings {
  readonly after: (() => void) | undefined;
}

const interpretAssign = (around: Surroundings, { target, value }: AssignStatement): Execute => {
  const evaluated = interpretExpression(around, value);
  switch (target.kind) {
    case "local": {
      const slot = slotOf(around, target.name);
      return (frame) => {
        frame[slot] = evaluated(frame);
      };
    }
    case "field": {
      const { holder, name } = reachHolder(around, target.place);
      return (frame) => {
        (holder(frame) as StructObject)[name] = evaluated(frame);
      };
    }
    case "element": {
      const array = reach(around, target.place);
      const index = interpretExpression(around, target.index);
      return (frame) => {
        (array(frame) as number[])[index(frame) as number] = evaluated(frame) as number;
      };
    }
  }
};

const interpretFor = (around: StatementSurroundings, statement: ForStatement): Execute => {
  const slot = slotOf(around, statement.variable);
  const from = interpretExpression(around, statement.from);
  const below = interpretExpression(around, statement.below);
  const body = interpretBody(around, statement.body);
  return (frame) => {
    const end = below(frame) as number;
    for (let i = from(frame) as number; i < end; i++) {
      frame[slot] = i;
      body(frame);
    }
  };
};

const interpretSwitch = (around: StatementSurroundings, statement: SwitchStatement): Execute => {
  const subject = interpretExpression(around, statement.subject);
  const otherwise = interpretBody(around, statement.otherwise);
  const cases = new Map(
    statement.cases.flatMap(({ members, body }) => {
      const execute = interpretBody(around, body);
      return members.map((member) => [member, execute] as const);
    }),
  );
  return (frame) => (cases.get(subject(frame) as string) ?? otherwise)(frame);
};

const interpretStatement = (around: StatementSurroundings, statement: Statement): Execute => {
  switch (statement.kind) {
    case "local": {
      const slot = slotOf(around, statement.name);
      const value = interpretExpression(around, statement.value);
      return (frame) => {
        frame[slot] = value(frame);
      };
    }
    case "assign":
      return interpretAssign(around, statement);
    case "if": {
      const condition = interpretExpression(around, statement.condition);
      const whenTrue = interpretBody(around, statement.whenTrue);
      const whenFalse = interpretBody(around, statement.whenFalse);
      return (frame) => (condition(frame) ? whenTrue : whenFalse)(frame);
    }
    case "switch":
      return interpretSwitch(around, statement);
    case "for":
      return interpretFor(around, statement);
    case "call": {
      const call = interpretCall(around, statement.call);
      return (frame) => {
        call(frame);
      };
    }
    case "block":
      return interpretBody(around, statement.body);
  }
};

export const interpretBody = (around: StatementSurroundings, body: readonly Statement[]): Execute => {
  const { after } = around;
  const steps = body.map((statement) => interpretStatement(around, statement));
  if (after === undefined) {
    return (frame) => {
      for (const step of steps) {
        step(frame);
      }
    };
  }
  return (frame) => {
    for (const step of steps) {
      step(frame);
      after();
    }
  };
};
