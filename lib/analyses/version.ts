/** Names the numbers an engine makes; raised with every change that may move a stored digit. Kept with each run. */
export const ENGINE_VERSION = "8";
