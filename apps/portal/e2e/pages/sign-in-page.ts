import type { Page } from 'playwright-core';

export class SignInPage {
  readonly failure;
  constructor(private readonly page: Page) {
    this.failure = page.getByRole('alert');
  }

  async open(): Promise<void> {
    await this.page.goto('/sign-in');
  }

  async signIn(email: string, password: string): Promise<void> {
    await this.page.getByLabel('Mail address').fill(email);
    await this.page.getByLabel('Password').fill(password);
    await this.page.getByRole('button', { name: 'Sign in', exact: true }).click();
  }
}
