/** Version of the protocol between device and server; see SPEC.md beside lib/device/sync. */
export const PROTOCOL = 1;
export const MOST_ENTRIES_IN_A_BATCH = 500;
export const PULL_PAGE = 1000;
