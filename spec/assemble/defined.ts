type Defined<T> = { [K in keyof T as undefined extends T[K] ? never : K]: T[K] } & {
  [K in keyof T as undefined extends T[K] ? K : never]?: Exclude<T[K], undefined>;
};

/** The object without its undefined members: an absent part has no key at all. */
export function defined<T extends object>(all: T): Defined<T> {
  return Object.fromEntries(Object.entries(all).filter(([, value]) => value !== undefined)) as Defined<T>;
}
