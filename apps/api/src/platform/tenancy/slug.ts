const SLUG = /^[a-z0-9]+(-[a-z0-9]+)*$/

/** Whether a text could be an academy's address. What could not be one is never looked for. */
export const isSlug = (text: string): boolean => SLUG.test(text)
