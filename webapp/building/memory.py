"""Write the memory of a started Python as what differs from the memory that its WebAssembly starts with.

Half of what is in that memory stands in pyodide.asm.wasm already, and most pages are empty: sent like this it is 2.5 MB
instead of 4. webapp/engine/memory.js puts it together again.
"""

import io
import struct
import zipfile

from webapp.building.stop import Stop

PAGE = 1024  # bytes; small, so that few unchanged bytes travel
DATA_SECTION = 11
I32_CONST = 0x41


def difference(snapshot, wasm):
    """Return a snapshot of memory as it travels.

    Parameters
    ----------
    snapshot : bytes
        As Pyodide makes it: a head, whose length is its second count, then the memory. [unitless]
    wasm : bytes
        The binary that the memory belongs to. [unitless]

    Returns
    -------
    sent : bytes
        Four counts, the head, the numbers of the pages that differ, and those pages, each XOR what it starts as.
    """
    head_size = struct.unpack_from('<I', snapshot, 4)[0]
    memory = snapshot[head_size:]
    changed = exclusive_or(memory, initial_memory(wasm, len(memory)))
    pages = [number for number in range(len(memory) // PAGE) if any(changed[number * PAGE : (number + 1) * PAGE])]
    counts = struct.pack('<4I', head_size, len(memory), PAGE, len(pages))
    index = struct.pack(f'<{len(pages)}I', *pages)

    return counts + snapshot[:head_size] + index + b''.join(changed[page * PAGE : (page + 1) * PAGE] for page in pages)


def exclusive_or(one, other):
    """Return the bytes in which two equally long texts differ, zero where they agree.

    Parameters
    ----------
    one, other : bytes
        Equally long. [unitless]

    Returns
    -------
    difference : bytes
        As long.
    """
    return (int.from_bytes(one, 'little') ^ int.from_bytes(other, 'little')).to_bytes(len(one), 'little')


def initial_memory(wasm, size):
    """Return the memory that a WebAssembly binary starts with.

    Parameters
    ----------
    wasm : bytes
        The binary; its data segments lie at fixed places. [unitless]
    size : int
        How much memory. [byte]

    Returns
    -------
    memory : bytearray
        The data segments, and zero between them.
    """
    memory = bytearray(size)
    at = 8
    while at < len(wasm):
        section, (length, start) = wasm[at], count(wasm, at + 1)
        if section == DATA_SECTION:
            place_segments(memory, wasm, start)
        at = start + length

    return memory


def place_segments(memory, wasm, at):
    """Copy the data segments of a binary into memory.

    Parameters
    ----------
    memory : bytearray
        Changed in place: it is 30 MB. [unitless]
    wasm : bytes
        The binary. [unitless]
    at : int
        Where the data section's contents begin. [byte]
    """
    segments, at = count(wasm, at)
    for _ in range(segments):
        kind, at = count(wasm, at)
        if kind != 0 or wasm[at] != I32_CONST:
            raise Stop(
                'pyodide.asm.wasm has a data segment of a kind that this build does not know: build with --no-snapshot.'
            )
        place, at = count(wasm, at + 1)
        length, at = count(wasm, at + 1)
        memory[place : place + length] = wasm[at : at + length]
        at += length


def count(wasm, at):
    """Return a count in the binary's own form (LEB128) and where the next thing begins.

    Parameters
    ----------
    wasm : bytes
        The binary. [unitless]
    at : int
        Where the count begins. [byte]

    Returns
    -------
    value, next : int
        The count, and the offset after it.
    """
    value = shift = 0
    while True:
        byte = wasm[at]
        at += 1
        value |= (byte & 127) << shift
        shift += 7
        if byte < 128:
            return value, at


def emptied(archive, names):
    """Return a zip archive without compression in which some members' contents are zero, everything else in its place.

    The memory of a Python that has imported them holds offsets into the archive, but never reads those members again.

    Parameters
    ----------
    archive : bytes
        The archive. [unitless]
    names : set of str
        The members. [unitless]

    Returns
    -------
    archive : bytes
        As long.
    """
    blank = bytearray(archive)
    with zipfile.ZipFile(io.BytesIO(archive)) as members:
        for member in members.infolist():
            if member.filename in names:
                name_size, extra_size = struct.unpack_from('<2H', archive, member.header_offset + 26)
                start = member.header_offset + 30 + name_size + extra_size
                blank[start : start + member.file_size] = bytes(member.file_size)

    return bytes(blank)
