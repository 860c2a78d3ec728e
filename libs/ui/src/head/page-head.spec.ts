import { TestBed } from '@angular/core/testing';
import { provideRouter } from '@angular/router';
import { PageHead } from './page-head';

describe('PageHead', () => {
  it('has one heading that can take the focus after a navigation', async () => {
    TestBed.configureTestingModule({ providers: [provideRouter([])] });
    const fixture = TestBed.createComponent(PageHead);
    fixture.componentRef.setInput('heading', 'Foxglove Lane');
    fixture.componentRef.setInput('sub', '22 machines');
    fixture.componentRef.setInput('upLink', ['/shop/clients']);
    fixture.componentRef.setInput('upLabel', 'Clients');
    await fixture.whenStable();
    const host = fixture.nativeElement as HTMLElement;
    expect(host.querySelector('h1')?.getAttribute('tabindex')).toBe('-1');
    expect(host.querySelector('p')?.textContent).toBe('22 machines');
    expect(host.querySelector('a')?.getAttribute('href')).toBe('/shop/clients');
  });
});
