import { closedDoors } from './suites/closed-doors.ts';
import { everyPage } from './suites/every-page.ts';
import { keyboard } from './suites/keyboard.ts';
import { landingPages } from './suites/landing-pages.ts';
import { wholeStory } from './suites/whole-story.ts';
import { useRunningRegistry } from './support/registry.ts';
import { useVisitors } from './support/visitors.ts';

// One registry and one browser for all suites: filling a registry is the costly part, and the suites keep out of each other's way.
const registry = useRunningRegistry();
const { open, browser } = useVisitors(registry);

wholeStory(open);
closedDoors(open);
keyboard(open);
everyPage(open, browser, registry);
landingPages(registry);
