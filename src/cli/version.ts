declare const __TALLYSTICK_VERSION__: string;

/** The version in package.json, written in when the command is built. */
export const version = __TALLYSTICK_VERSION__;
