import { HttpErrorResponse } from '@angular/common/http';
import { describeFailure } from './api-error';

const document = {
  type: 'about:blank',
  title: 'Unprocessable Content',
  status: 422,
  detail: 'The fractions add up to 0.91.',
  instance: 'req-1',
  errors: { fractions: 'The sum must lie between 0.98 and 1.02.' },
};

describe('a failed request in words', () => {
  it('passes on what a problem document says, with its fields and the request’s id', () => {
    expect(describeFailure(new HttpErrorResponse({ status: 422, error: document }))).toEqual({
      title: 'The server refused',
      detail: 'The fractions add up to 0.91.',
      words: 'The fractions add up to 0.91.',
      status: 422,
      fields: { fractions: 'The sum must lie between 0.98 and 1.02.' },
      requestId: 'req-1',
    });
  });

  it('reads a problem document that came as text', () => {
    const error = new HttpErrorResponse({ status: 422, error: JSON.stringify(document) });
    expect(describeFailure(error).detail).toBe('The fractions add up to 0.91.');
  });

  it('says that the server cannot be reached when there is no answer', () => {
    const failure = describeFailure(new HttpErrorResponse({ status: 0, error: new ProgressEvent('error') }));
    expect(failure).toMatchObject({
      status: 0,
      words:
        'The server cannot be reached. Check that this computer is on the plant network, then try again.',
    });
  });

  it('names the status where a page of something in between answered', () => {
    const failure = describeFailure(
      new HttpErrorResponse({ status: 502, error: '<html>Bad gateway</html>' }),
    );
    expect(failure.detail).toContain('502');
  });

  it('says that a reload may help where the answer did not fit the contract', () => {
    expect(describeFailure(new Error('invalid')).detail).toContain('reload');
  });
});
