import { ChangeDetectionStrategy, Component } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { RouterTestingHarness } from '@angular/router/testing';
import { HeadingFocus } from './heading-focus';
import { provideTestCore } from './testing';

@Component({
  selector: 'app-first-page',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: '<main><h1>First</h1></main>',
})
class FirstPage {}

@Component({
  selector: 'app-second-page',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: '<main><h1>Second</h1></main>',
})
class SecondPage {}

describe('the focus after a navigation', () => {
  let harness: RouterTestingHarness;

  beforeEach(async () => {
    const routes = [
      { path: 'first', component: FirstPage },
      { path: 'second', component: SecondPage },
    ];
    TestBed.configureTestingModule({ providers: [provideTestCore({ routes })] });
    TestBed.inject(HeadingFocus);
    harness = await RouterTestingHarness.create();
    document.body.append(harness.fixture.nativeElement as HTMLElement);
  });
  afterEach(() => (harness.fixture.nativeElement as HTMLElement).remove());

  it('stays where the browser puts it when the application opens', async () => {
    await harness.navigateByUrl('/first');
    expect(document.activeElement).toBe(document.body);
  });

  it('goes to the heading of the screen that was opened', async () => {
    await harness.navigateByUrl('/first');
    await harness.navigateByUrl('/second');
    await harness.fixture.whenStable();
    expect(document.activeElement?.textContent).toBe('Second');
  });

  it('stays where it is when only a filter changed', async () => {
    await harness.navigateByUrl('/first');
    await harness.navigateByUrl('/first?kind=note');
    await harness.fixture.whenStable();
    expect(document.activeElement).toBe(document.body);
  });
});
