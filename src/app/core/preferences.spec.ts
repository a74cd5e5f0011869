import { DOCUMENT } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { Preferences } from './preferences';

describe('preferences', () => {
  beforeEach(() => localStorage.clear());

  it('begin with the units of the site’s laboratory and the colours of the computer', () => {
    const preferences = TestBed.inject(Preferences);
    expect(preferences.theme()).toBe('system');
    expect(preferences.isNight()).toBe(false);
    expect(preferences.units()).toMatchObject({ temperature: '°C', pressure: 'kPa', fraction: 'mol %' });
  });

  it('are kept for the next visit', () => {
    TestBed.inject(Preferences).choose({ pressure: 'psi', theme: 'night' });
    TestBed.resetTestingModule();
    const nextVisit = TestBed.inject(Preferences);
    expect(nextVisit.units().pressure).toBe('psi');
    expect(nextVisit.theme()).toBe('night');
  });

  it('put the theme on the page, where the style sheet finds it', () => {
    const preferences = TestBed.inject(Preferences);
    const page = TestBed.inject(DOCUMENT).documentElement;
    preferences.choose({ theme: 'night' });
    TestBed.tick();
    expect(page.getAttribute('data-theme')).toBe('night');
    preferences.choose({ theme: 'day' });
    TestBed.tick();
    expect(page.getAttribute('data-theme')).toBe('day');
  });

  it.each(['{"pressure":"furlongs"}', 'not json'])('fall back where storage holds %s', (kept) => {
    localStorage.setItem('dewmark.preferences', kept);
    expect(TestBed.inject(Preferences).units().pressure).toBe('kPa');
  });

  it('last as long as the page where storage is forbidden', () => {
    const refuse = vi.spyOn(Storage.prototype, 'setItem').mockImplementation(() => {
      throw new DOMException('forbidden', 'SecurityError');
    });
    const preferences = TestBed.inject(Preferences);
    preferences.choose({ fraction: 'ppm' });
    expect(preferences.units().fraction).toBe('ppm');
    refuse.mockRestore();
  });
});
