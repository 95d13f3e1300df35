/** Changes whenever a result may change. */
export const ENGINE_VERSION = '0.1.0'
