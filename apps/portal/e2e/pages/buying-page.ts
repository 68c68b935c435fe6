import type { Locator, Page } from 'playwright-core';

export class BuyingPage {
  constructor(private readonly page: Page) {}

  async find(part: string): Promise<void> {
    await this.page.goto('/buying-status');
    await this.page.getByLabel('Find part or supplier').fill(part);
  }

  line(part: string): Locator {
    return this.page.getByRole('row').filter({ hasText: part });
  }
}
