import packageJson from '../../package.json' with { type: 'json' };

/** The version that every exported file carries. */
export const PROGRAM_VERSION: string = packageJson.version;
