/** Version of the calculation: it changes whenever the same design may give other numbers. */
export const ENGINE_VERSION = '1.0.0';
