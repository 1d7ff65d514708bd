/** Version of the computing core; stored with every result. Raised whenever a change may alter a figure. */
export const CORE_VERSION = '0.4.0';
