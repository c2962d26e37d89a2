/** Whether an installation begins with the demonstration, whose sign-ins are known to everybody. */

/**
 * DEMO as set, or else `on` where only this machine reaches the server and nobody is named administrator.
 * @param {NodeJS.ProcessEnv} env
 * @param {string} host the address the server listens on
 * @returns {string}
 */
export function demoSetting(env, host) {
  if (env.DEMO) return env.DEMO;
  const isPrivate = isLoopback(host) && (!env.PUBLIC_URL || isLoopback(hostOf(env.PUBLIC_URL)));
  return isPrivate && !env.ADMIN_EMAIL ? 'on' : 'off';
}

/** @param {string} url */
const hostOf = (url) => (URL.canParse(url) ? new URL(url).hostname : '');

/** @param {string} host */
const isLoopback = (host) => /^(localhost|127(\.\d+){3}|\[?::1\]?)$/.test(host);
