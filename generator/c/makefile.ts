import type { Program } from "../ir/program.ts";

/** Flags under which the code was made to be clean; gcc and float32 also take -Wunsuffixed-float-constants. */
export const WARNINGS: readonly string[] = [
  "-pedantic",
  "-Wall",
  "-Wextra",
  "-Wconversion",
  "-Wsign-conversion",
  "-Wdouble-promotion",
  "-Wfloat-conversion",
  "-Wfloat-equal",
  "-Wshadow",
  "-Wundef",
  "-Wcast-qual",
  "-Wstrict-prototypes",
  "-Wmissing-prototypes",
  "-Wswitch-default",
  "-Wvla",
  "-Werror",
];

/** Flags that the bits depend on. */
export const ARITHMETIC: readonly string[] = ["-std=c99", "-ffp-contract=off", "-fno-math-errno"];

/** Builds a static library; CC, AR and OPT may be set from outside for a cross build. */
export const printMakefile = (program: Program): string => {
  const { name } = program;
  return `# ${name}: builds lib${name}.a. For another target: make CC=... AR=... OPT=...
# The first line of flags decides the bits: no fused multiply-add, no reassociation.
CC ?= gcc
AR ?= ar
OPT ?= -O2
ARITHMETIC = ${ARITHMETIC.join(" ")}
WARNINGS = ${WARNINGS.slice(0, 8).join(" ")} \\
\t${WARNINGS.slice(8).join(" ")}
OBJECTS = ${name}.o ${name}_cal.o

lib${name}.a: $(OBJECTS)
\t$(AR) rcs $@ $(OBJECTS)

%.o: %.c ${name}.h
\t$(CC) $(ARITHMETIC) $(OPT) $(WARNINGS) $(CFLAGS) -c $< -o $@

clean:
\trm -f $(OBJECTS) lib${name}.a

.PHONY: clean
`;
};
