/** Optional help where script runs: a reading cursor and zoom over charts with a time axis. Filled below. */
export const PAGE_SCRIPT = `"use strict";`;
