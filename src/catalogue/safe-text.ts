/** Text from outside that has been cleaned once, at the border. Only `safeText` makes it. */
export type SafeText = string & { readonly __safe: unique symbol };
