import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { readTimestampReply, replyFault, timestampRequest, UnreadableReply } from '#shared/ledger/timestamp-token.ts';

// Made by openssl 3.0 over the six bytes "hello\n": ts -query -sha256 -cert, and ts -reply.
const request =
  '30440201013031300d0609608648016503040201050004205891b5b522d5df086d0ff0b110fbd9d21bb4fc7163af34d08286a2e846f6be030209008a62ae45c9351c9c0101ff';
const reply = Uint8Array.from(
  Buffer.from(
    'MIIFBjADAgEAMIIE/QYJKoZIhvcNAQcCoIIE7jCCBOoCAQMxDzANBglghkgBZQMEAgEFADByBgsqhkiG9w0BCRABBKBjBGEwXwIBAQYEKgMEATAxMA0GCWCGSAFlAwQCAQUABCBYkbW1ItXfCG0P8LEQ+9nSG7T8cWOvNNCChqLoRva+AwIBAhgTMjAyNjEyMDExNDExMTAuOTc2WgIJAIpirkXJNRycoIIDGTCCAaQwggFJoAMCAQICFHxwTRcimN7zrksCvPCC0O7uV4/mMAoGCCqGSM49BAMCMBUxEzARBgNVBAMMCkxvY2FsIHJvb3QwHhcNMjYxMjAxMTQxMTEwWhcNMzYxMTI4MTQxMTEwWjAUMRIwEAYDVQQDDAlMb2NhbCBUU0EwWTATBgcqhkjOPQIBBggqhkjOPQMBBwNCAATnpGfVSCUNqbPJXMyZlaPxYPYnSrfHR4/h5o/tOZnfDlZXnb+gh1yV1tH0cD8ADCA9/IVVH3+PhMvsCCDsEQRJo3gwdjAMBgNVHRMBAf8EAjAAMA4GA1UdDwEB/wQEAwIHgDAWBgNVHSUBAf8EDDAKBggrBgEFBQcDCDAdBgNVHQ4EFgQUzbcXgWYUbA23VF4DzOurB4XJvC0wHwYDVR0jBBgwFoAUFJH6RJeO68C6Z2OyYNrRM7dOJpIwCgYIKoZIzj0EAwIDSQAwRgIhAJfpxzITxILVqgr+k1DZj/jccNJXr8aaMGzgalSVOft4AiEAtwb016Yzq7jMu4hNMdNP3cCBGPsu8OmSg3m6bxq2/JswggFtMIIBFKADAgECAhQ8s1C9PvLWEZKwgzv2k2Lscv7AmTAKBggqhkjOPQQDAjAVMRMwEQYDVQQDDApMb2NhbCByb290MB4XDTI2MTIwMTE0MTExMFoXDTQ2MTEyNjE0MTExMFowFTETMBEGA1UEAwwKTG9jYWwgcm9vdDBZMBMGByqGSM49AgEGCCqGSM49AwEHA0IABGU8s5DYheSVK3RiyqlG9mdoEREvnVXNay/NtgvZo2C2vtmafWJ1VHJKnxhLK9NO6zQev2NhW1UZ1Eo0Zj5RK2ajQjBAMA8GA1UdEwEB/wQFMAMBAf8wDgYDVR0PAQH/BAQDAgEGMB0GA1UdDgQWBBQUkfpEl47rwLpnY7Jg2tEzt04mkjAKBggqhkjOPQQDAgNHADBEAiA9Y/68ATk3q4G/Beo2yPyOxadvLd3IX5fsJKxzPpoGbAIgFBYHYhTKjIyJ+GqlXAW4FZ7BSlEPiD2MiMbmT6eKdk0xggFBMIIBPQIBATAtMBUxEzARBgNVBAMMCkxvY2FsIHJvb3QCFHxwTRcimN7zrksCvPCC0O7uV4/mMA0GCWCGSAFlAwQCAQUAoIGkMBoGCSqGSIb3DQEJAzENBgsqhkiG9w0BCRABBDAcBgkqhkiG9w0BCQUxDxcNMjYxMjAxMTQxMTEwWjAvBgkqhkiG9w0BCQQxIgQgmGy3XRfkTGtmVHHG3kcC+99Wo3tx9PA5GId2I5D59QYwNwYLKoZIhvcNAQkQAi8xKDAmMCQwIgQgeWgyVOgKDbUdO1YVJL/1rwrEt4j3s9ri2rktafv44zAwCgYIKoZIzj0EAwIERzBFAiBJXQ+69MLXvu7lERz9MKlnU2ktZTcokg6FsMvdBvcYVwIhAJCk1h6D8LFgooDbPRNKgVVEBdR9Rk5gk9cpsFCTseMV',
    'base64',
  ),
);
const asked = {
  imprint: '5891b5b522d5df086d0ff0b110fbd9d21bb4fc7163af34d08286a2e846f6be03',
  nonce: '8a62ae45c9351c9c',
};

describe('a timestamp', () => {
  it('is asked for byte for byte as openssl asks [X1]', () => {
    expect(Buffer.from(timestampRequest(asked.imprint, asked.nonce)).toString('hex')).toBe(request);
  });

  it('is read as openssl prints it [X1]', () => {
    const { status, words, token } = readTimestampReply(reply);
    expect({ status, words, ...token, certificates: token?.certificates.length }).toEqual({
      status: 0,
      words: '',
      imprint: asked.imprint,
      time: '2026-12-01T14:11:10.976Z',
      nonce: asked.nonce,
      serial: '2',
      policy: '1.2.3.4.1',
      certificates: 2,
    });
    expect(replyFault(readTimestampReply(reply), asked)).toBeNull();
  });

  it.each([
    [{ ...asked, imprint: '0'.repeat(64) }, 'something else'],
    [{ ...asked, nonce: '8a62ae45c9351c9d' }, 'number'],
  ])('is no answer to another question [X3]', (other, why) => {
    expect(replyFault(readTimestampReply(reply), other)).toContain(why);
  });

  it('that is bent anywhere is read or refused in words, and never breaks its reader [X3]', () => {
    const place = fc.nat({ max: reply.length - 1 });
    fc.assert(
      fc.property(place, fc.integer({ min: 1, max: 255 }), place, (at, change, end) => {
        const bent = Uint8Array.from(reply);
        bent[at] = (bent[at] ?? 0) ^ change;
        for (const bytes of [bent, bent.subarray(0, end), bent.subarray(end)]) {
          try {
            replyFault(readTimestampReply(bytes), asked);
          } catch (error) {
            expect(error).toBeInstanceOf(UnreadableReply);
          }
        }
      }),
      { numRuns: 400 },
    );
  });
});
