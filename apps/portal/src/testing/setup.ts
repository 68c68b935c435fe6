import '@testing-library/jest-dom/vitest';
import { cleanup, configure } from '@testing-library/react';
import { afterEach, vi } from 'vitest';
import { setCsrfToken } from '../lib/api-client.ts';

afterEach(() => {
  vi.unstubAllGlobals();
  setCsrfToken(null);
});

// Tests of pure modules run without a document.
if (typeof window !== 'undefined') preparePage();

function preparePage(): void {
  // A page's module is loaded when it is first shown; a busy machine takes its time for that.
  configure({ asyncUtilTimeout: 10_000 });

  afterEach(() => {
    cleanup();
    localStorage.clear();
  });

  // jsdom has neither modal dialogs nor popovers: these open and close, without the browser's rules of focus and layer.
  HTMLDialogElement.prototype.showModal ??= function showModal(this: HTMLDialogElement) {
    this.open = true;
    this.querySelector<HTMLElement>('button, input, select, textarea')?.focus();
  };
  HTMLDialogElement.prototype.close ??= function close(this: HTMLDialogElement) {
    this.open = false;
  };
  HTMLElement.prototype.showPopover ??= function showPopover(this: HTMLElement) {
    this.style.setProperty('display', 'block');
  };
  HTMLElement.prototype.hidePopover ??= function hidePopover(this: HTMLElement) {
    this.style.removeProperty('display');
  };
  Element.prototype.scrollIntoView ??= function scrollIntoView() {};
  window.scrollTo = () => undefined;
}
