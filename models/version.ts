/** Rises whenever results change; stored with every result. */
export const MODEL_VERSION = '1.0.0';
