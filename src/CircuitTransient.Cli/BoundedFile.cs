namespace CircuitTransient.Cli;

/// <summary>A file that is read only so far: a pipe or a device has no length that could be asked
/// first.</summary>
public static class BoundedFile
{
    /// <summary>Reads a whole file.</summary>
    /// <param name="path">Where it is.</param>
    /// <param name="most">The most bytes it may have.</param>
    /// <returns>Its bytes; where it has more than it may, one more than that.</returns>
    public static byte[] Read(string path, int most)
    {
        using var stream = File.OpenRead(path);
        var expected = stream.CanSeek ? Math.Min(stream.Length, most) + 1 : 1 << 16;
        var bytes = new byte[expected];
        var length = 0;
        while (length <= most && stream.Read(bytes.AsSpan(length)) is > 0 and var count)
        {
            length += count;
            if (length == bytes.Length && length <= most)
            {
                Array.Resize(ref bytes, (int)Math.Min(2L * length, most + 1L));
            }
        }

        Array.Resize(ref bytes, length);
        return bytes;
    }
}
