/**
 * An object with one key. For the key `then`, which an object literal must not have: it would pass for a promise.
 */
export const keyed = <const Name extends string, T>(name: Name, value: T): { readonly [K in Name]: T } =>
  ({ [name]: value }) as { readonly [K in Name]: T };
