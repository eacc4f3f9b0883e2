/** The key of who is signed in and where they belong, for what makes it out of date. */
export const SESSION_KEY = ['', 'session.read'] as const
