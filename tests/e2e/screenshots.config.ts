import config from './playwright.config';

/** `npm run screenshots`: makes the README's pictures anew from the demonstration's plant. */
export default { ...config, testMatch: 'screenshots.shots.ts', workers: 1, reporter: 'list' };
