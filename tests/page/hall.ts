import type { PageData } from '../../src/deliver/page-data.ts';
import type { OpenedPage, TestBrowser } from '../support/browser.ts';
import { communityHall } from '../support/community-hall.ts';
import { exampleData, examplePage } from '../support/example-page.ts';

export type Opener = (data: PageData, options?: Parameters<TestBrowser['open']>[1]) => Promise<OpenedPage>;

export const hall = exampleData(examplePage(communityHall));

export const idOf = (name: string): string =>
  [...hall.result.pipes, ...hall.result.fixtures].find((row) => row.name === name)!.globalId;
