"""Photos: whether bytes are the picture they say, and the same picture without what it tells.

Cameras write place, time and owner beside a picture. What is dropped: of JPEG (ITU-T T.81, annex
B) the application segments but JFIF, colour profile and Adobe's colour transform, and comments; of
PNG (ISO/IEC 15948) text, time and Exif chunks; of WebP (RFC 9649) the Exif and XMP chunks. The
picture itself is not touched. The turn that Exif may state is lost; phones here turn the picture
itself before they keep it.
"""

from __future__ import annotations

FIRST_BYTES = {
    "image/jpeg": b"\xff\xd8\xff",
    "image/png": b"\x89PNG",
    "image/webp": b"RIFF",
}
PNG_HEAD = 8
PNG_DROPPED = {b"tEXt", b"zTXt", b"iTXt", b"tIME", b"eXIf"}
WEBP_HEAD = 12
WEBP_DROPPED = {b"EXIF", b"XMP "}
WEBP_MARKS = 0x08 | 0x04  # of VP8X: Exif, XMP
JPEG_KEPT_APPS = {0xE0, 0xE2, 0xEE}  # JFIF, colour profile, Adobe
JPEG_SCAN, JPEG_COMMENT = 0xDA, 0xFE


def is_picture(content: bytes, kind: str) -> bool:
    """Whether bytes begin as a picture of that kind does."""
    return kind in FIRST_BYTES and content.startswith(FIRST_BYTES[kind])


def without_metadata(content: bytes, kind: str) -> bytes:
    """The same picture without place, time, owner and comments."""
    if kind == "image/jpeg":
        return _jpeg(content)
    return _png(content) if kind == "image/png" else _webp(content)


def _jpeg(content: bytes) -> bytes:
    kept, at = bytearray(content[:2]), 2
    while at + 4 <= len(content) and content[at] == 0xFF:
        marker = content[at + 1]
        if marker == JPEG_SCAN:
            break
        length = 2 + int.from_bytes(content[at + 2 : at + 4], "big")
        app = 0xE0 <= marker <= 0xEF
        if not (marker == JPEG_COMMENT or (app and marker not in JPEG_KEPT_APPS)):
            kept += content[at : at + length]
        at += length
    return bytes(kept + content[at:])


def _png(content: bytes) -> bytes:
    kept, at = bytearray(content[:PNG_HEAD]), PNG_HEAD
    while at + 12 <= len(content):
        end = at + 12 + int.from_bytes(content[at : at + 4], "big")
        if content[at + 4 : at + 8] not in PNG_DROPPED:
            kept += content[at:end]
        at = end
    return bytes(kept + content[at:])


def _webp(content: bytes) -> bytes:
    kept, at = bytearray(content[:WEBP_HEAD]), WEBP_HEAD
    while at + 8 <= len(content):
        size = int.from_bytes(content[at + 4 : at + 8], "little")
        end = at + 8 + size + size % 2
        chunk = bytearray(content[at:end])
        if chunk[:4] == b"VP8X" and len(chunk) > 8:
            chunk[8] &= ~WEBP_MARKS & 0xFF
        if content[at : at + 4] not in WEBP_DROPPED:
            kept += chunk
        at = end
    kept += content[at:]
    kept[4:8] = (len(kept) - 8).to_bytes(4, "little")
    return bytes(kept)
