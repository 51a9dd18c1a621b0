const C_KEYWORDS =
  "auto break case char const continue default do double else enum extern float for goto if inline int long register " +
  "restrict return short signed sizeof static struct switch typedef union unsigned void volatile while bool true false " +
  "asm main errno signal";
const TYPESCRIPT_KEYWORDS =
  "arguments as async await boolean case catch class const debugger declare delete enum eval export extends finally " +
  "function get global implements import in instanceof interface is keyof let module namespace never new null number " +
  "object of package private protected public readonly require set static string super symbol this throw try type " +
  "typeof undefined unique unknown var with yield constructor prototype f";
/** Functions of the C library: a static function of that name would hide one. */
const C_LIBRARY =
  "abs labs div ldiv acos asin atan atan2 cos sin tan cosh sinh tanh exp frexp ldexp log log10 modf pow sqrt ceil fabs " +
  "floor fmod round trunc rint exp2 expm1 log2 log1p logb cbrt hypot erf erfc tgamma lgamma gamma remainder remquo fdim " +
  "fmax fmin fma nan scalbn ilogb j0 j1 jn y0 y1 yn index time clock exit abort atexit free malloc calloc realloc rand " +
  "srand qsort getenv system read write open close link select min max clamp_real";

const keywords = new Set(`${C_KEYWORDS} ${TYPESCRIPT_KEYWORDS}`.split(" "));
const functions = new Set(C_LIBRARY.split(" "));

/** Longest identifier part that we make: C99 5.2.4.1 guarantees 31 significant characters for external names only. */
const LONGEST_NAME = 24;

/** `boostPressureKpa` as `boost_pressure_kpa`; a dot joins the parts of a table. */
export const snakeCase = (name: string): string =>
  name
    .replace(/\./g, "_")
    .replace(/([a-z0-9])([A-Z])/g, "$1_$2")
    .replace(/([A-Z])([A-Z][a-z])/g, "$1_$2")
    .toLowerCase();

export const upperCase = (name: string): string => snakeCase(name).toUpperCase();

/** A name for data that neither language reserves, the same in both. */
export const safeName = (name: string): string => (keywords.has(name) ? `${name}_` : name);

/** A name for a function, which must not hide one of the C library either. */
export const safeFunctionName = (name: string): string => (functions.has(name) ? `${name}_` : safeName(name));

/**
 * Turns the controller's name from a spec, which may hold anything, into the stem of file and function names: lower
 * case ASCII letters, digits and single underscores, at most 24, starting with a letter, no word of C or TypeScript.
 */
export const stemFrom = (name: string): string => {
  const plain = name
    .toLowerCase()
    .replace(/[^a-z0-9]+/g, "_")
    .replace(/^_+/, "")
    .slice(0, LONGEST_NAME)
    .replace(/_+$/, "");
  const lettered = /^[a-z]/.test(plain) ? plain : `loop_${plain}`.replace(/_+$/, "");
  return keywords.has(lettered) || functions.has(lettered) ? `${lettered}_loop` : lettered;
};
