import { render, screen } from '@testing-library/react';
import { MemoryRouter } from 'react-router-dom';
import { afterEach, describe, expect, it } from 'vitest';
import { queryClient } from '../../../src/app/query-client.ts';
import { writeSignedInHint } from '../../../src/app/signed-in-hint.ts';
import { SiteHeader } from '../../../src/app/site-header.tsx';
import { answerApi } from '../../support/answer-api.ts';
import { marenSession } from '../../support/session-examples.ts';

function openHeader(at = '/check') {
  render(
    <MemoryRouter initialEntries={[at]}>
      <SiteHeader />
    </MemoryRouter>,
  );
}

afterEach(() => {
  queryClient.clear();
});

describe('the header', () => {
  it('asks the server nothing for a visitor', () => {
    const requests = answerApi({});
    openHeader();
    expect(screen.getByRole('link', { name: 'Sign in' })).toHaveAttribute(
      'href',
      '/sign-in?next=%2Fcheck',
    );
    expect(requests).toEqual([]);
  });

  it('does not lead back to pages that make no sense afterwards', () => {
    openHeader('/forgot-password');
    expect(screen.getByRole('link', { name: 'Sign in' })).toHaveAttribute('href', '/sign-in');
  });

  it('shows the person and the ways to their own places', async () => {
    answerApi({ 'GET /api/session': { body: marenSession } });
    writeSignedInHint(true);
    openHeader();
    expect(await screen.findByRole('link', { name: 'Account of Maren Holt' })).toBeInTheDocument();
    expect(screen.getByRole('link', { name: 'Studio' })).toHaveAttribute(
      'href',
      '/studio/harbour-lane-mixing',
    );
  });

  it('shows no studio to those who have none', async () => {
    answerApi({ 'GET /api/session': { body: { ...marenSession, studios: [] } } });
    writeSignedInHint(true);
    openHeader();
    await screen.findByRole('link', { name: 'My checks' });
    expect(screen.queryByRole('link', { name: 'Studio' })).toBeNull();
  });

  it('offers to sign in where the remembered session has ended, and forgets it', async () => {
    const requests = answerApi({ 'GET /api/session': { body: { user: null, studios: [] } } });
    writeSignedInHint(true);
    openHeader();
    expect(await screen.findByRole('link', { name: 'Sign in' })).toBeInTheDocument();
    expect(requests).toHaveLength(1);
    expect(localStorage.getItem('flightcase-signed-in')).toBeNull();
  });
});
