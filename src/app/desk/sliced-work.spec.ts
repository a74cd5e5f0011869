import { SlicedWork, type Slices } from './sliced-work';

/** A page whose frames are drawn by hand, and a clock that each step of the work moves on. */
function aPage() {
  const resumes: (() => void)[] = [];
  let time = 0;
  return {
    later: (resume: () => void) => void resumes.push(resume),
    now: () => time,
    take: (ms: number) => (time += ms),
    frame: () => resumes.splice(0).forEach((resume) => resume()),
    isIdle: () => resumes.length === 0,
  };
}

function* counting(name: string, steps: number, page: ReturnType<typeof aPage>, stepMs = 4): Slices<string> {
  for (let i = 0; i < steps; i++) {
    page.take(stepMs);
    yield;
  }
  return name;
}

describe('sliced work', () => {
  it('does nothing before the frame, then at most a slice a frame, and reports its result once', () => {
    const page = aPage();
    const results: string[] = [];
    const work = new SlicedWork<string>(page.later, page.now, (result) => results.push(result));
    work.request(() => counting('a', 5, page));
    expect(page.now()).toBe(0);
    page.frame();
    expect(page.now()).toBe(8);
    page.frame();
    expect(page.now()).toBe(16);
    expect(results).toEqual([]);
    page.frame();
    expect(results).toEqual(['a']);
    expect(page.isIdle()).toBe(true);
  });

  it('finishes what it began and then takes only the latest of the requests that came meanwhile', () => {
    const page = aPage();
    const results: string[] = [];
    const begun: string[] = [];
    const work = new SlicedWork<string>(page.later, page.now, (result) => results.push(result));
    const request = (name: string) =>
      work.request(() => {
        begun.push(name);
        return counting(name, 5, page);
      });
    request('a');
    page.frame();
    request('b');
    request('c');
    while (!page.isIdle()) page.frame();
    expect(results).toEqual(['a', 'c']);
    expect(begun).toEqual(['a', 'c']);
  });

  it('goes on with the next request after a fault in one', () => {
    const page = aPage();
    const results: string[] = [];
    const work = new SlicedWork<string>(page.later, page.now, (result) => results.push(result));
    work.request(function* (): Slices<string> {
      yield;
      throw new Error('a bug');
    });
    work.request(() => counting('b', 1, page));
    expect(() => page.frame()).toThrow('a bug');
    while (!page.isIdle()) page.frame();
    expect(results).toEqual(['b']);
  });

  it('reports nothing after it was stopped', () => {
    const page = aPage();
    const results: string[] = [];
    const work = new SlicedWork<string>(page.later, page.now, (result) => results.push(result));
    work.request(() => counting('a', 2, page));
    work.stop();
    while (!page.isIdle()) page.frame();
    expect(results).toEqual([]);
  });
});
