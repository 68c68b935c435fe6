import { createSecretKey, hkdfSync } from 'node:crypto';
import { parseCookie } from 'cookie';
import type { Request, Response } from 'express';
import jwt from 'jsonwebtoken';
import { Passport } from 'passport';
import { Strategy } from 'passport-jwt';
import type { Clock } from '../clock.ts';
import type { Actor } from './actor.ts';

const issuer = 'trammel';
const audience = 'trammel-portal';
const skewSeconds = 30;
const mostRemembered = 5000;

interface Claims {
  readonly sid: string;
  readonly use: string;
  readonly nbf: number;
  readonly exp: number;
}

export interface AuthenticateOptions {
  readonly secret: Buffer;
  readonly publicUrl: string;
  readonly clock: Clock;
  /** The living session of this id and its person, or null: revoked, run out, disabled. */
  readonly findActor: (sessionId: string) => Actor | null;
}

export interface Authentication {
  /** Null for anyone without a living session. */
  readonly actorOf: (req: Request, res: Response) => Promise<Actor | null>;
  readonly issue: (res: Response, sessionId: string, expiresAt: string) => void;
  readonly clear: (res: Response) => void;
  readonly csrfKey: Buffer;
}

/** One key a purpose, drawn from the one secret, so that a token of one kind is never valid as another. */
export function purposeKey(secret: Buffer, purpose: string): Buffer {
  return Buffer.from(hkdfSync('sha256', secret, Buffer.alloc(0), `trammel ${purpose}`, 32));
}

export function createAuthentication(options: AuthenticateOptions): Authentication {
  const { clock, findActor } = options;
  // A KeyObject is verified some 49 times cheaper than a string secret.
  const key = createSecretKey(purposeKey(options.secret, 'session token'));
  const https = options.publicUrl.startsWith('https:');
  const cookieName = https ? '__Host-trammel' : 'trammel';
  const cookieOptions = { httpOnly: true, secure: https, sameSite: 'lax', path: '/' } as const;

  const passport = new Passport();
  passport.use(
    new Strategy(
      {
        // The types know text and bytes only; the strategy hands whatever it is given to jsonwebtoken.
        secretOrKey: key as unknown as Buffer,
        jwtFromRequest: (req) => parseCookie(req?.headers.cookie ?? '')[cookieName] ?? null,
        algorithms: ['HS256'],
        issuer,
        audience,
        // Times are compared below with the injected clock.
        ignoreExpiration: true,
        jsonWebTokenOptions: { ignoreNotBefore: true },
      },
      (claims: Claims, done) => done(null, claims),
    ),
  );

  const verify = (req: Request, res: Response) =>
    new Promise<Claims | null>((resolve, reject) => {
      const check = passport.authenticate(
        'jwt',
        { session: false },
        (error: unknown, claims: Claims | false) => {
          if (error) reject(error instanceof Error ? error : new Error(String(error)));
          else resolve(claims || null);
        },
      ) as (req: Request, res: Response, next: () => void) => void;
      check(req, res, () => resolve(null));
    });

  // The signature of the same bytes is the same each time; session, person and times are looked up at every request.
  const verified = new Map<string, Claims>();
  const remember = (token: string, claims: Claims) => {
    if (verified.has(token)) return;
    if (verified.size >= mostRemembered) verified.clear();
    verified.set(token, claims);
  };

  return {
    csrfKey: purposeKey(options.secret, 'page token'),
    actorOf: async (req, res) => {
      if (req.headers.cookie === undefined) return null;
      const token = parseCookie(req.headers.cookie)[cookieName];
      if (token === undefined) return null;
      const claims = verified.get(token) ?? (await verify(req, res));
      if (!claims) return null;
      remember(token, claims);
      const seconds = clock.millis() / 1000;
      const inTime = seconds > claims.nbf - skewSeconds && seconds < claims.exp + skewSeconds;
      const usable = claims.use === 'session' && typeof claims.sid === 'string' && inTime;
      return usable ? findActor(claims.sid) : null;
    },
    issue: (res, sessionId, expiresAt) => {
      const exp = Math.floor(Date.parse(expiresAt) / 1000);
      const now = Math.floor(clock.millis() / 1000);
      const token = jwt.sign({ sid: sessionId, use: 'session', iat: now, nbf: now, exp }, key, {
        algorithm: 'HS256',
        issuer,
        audience,
      });
      res.cookie(cookieName, token, { ...cookieOptions, maxAge: exp * 1000 - clock.millis() });
    },
    clear: (res) => {
      res.clearCookie(cookieName, cookieOptions);
      res.setHeader('Clear-Site-Data', '"cache", "storage"');
    },
  };
}
