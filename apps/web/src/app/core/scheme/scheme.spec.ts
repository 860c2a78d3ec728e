import { TestBed } from '@angular/core/testing';
import { Scheme } from './scheme';
import { SchemeToggle } from './scheme-toggle';

describe('Scheme', () => {
  beforeEach(() => localStorage.clear());

  it('follows the system until the person chooses, and keeps the choice', async () => {
    const fixture = TestBed.createComponent(SchemeToggle);
    await fixture.whenStable();
    expect(document.documentElement.dataset['scheme']).toBe('system');
    const dark = (fixture.nativeElement as HTMLElement).querySelectorAll('input')[2];
    dark?.click();
    await fixture.whenStable();
    expect(document.documentElement.dataset['scheme']).toBe('dark');
    expect(localStorage.getItem('tw.scheme')).toBe('dark');
  });

  it('takes up what was kept, but nothing else', () => {
    localStorage.setItem('tw.scheme', 'light');
    expect(TestBed.inject(Scheme).choice()).toBe('light');
    TestBed.resetTestingModule();
    localStorage.setItem('tw.scheme', 'sepia');
    expect(TestBed.inject(Scheme).choice()).toBe('system');
  });
});
