/** `rate_above` to `rateAbove`; the type-level twin is `Camel`. */
export const camel = (name: string): string =>
  name.replace(/_([a-z0-9])/g, (_, letter: string) => letter.toUpperCase());
