using CircuitTransient.Cli;

namespace CircuitTransient.Tests.Cli;

/// <summary>What is read of a file.</summary>
public class BoundedFileTests
{
    [Theory]
    [InlineData(0), InlineData(1), InlineData(65_536), InlineData(200_000)]
    public void A_file_within_its_bound_is_read_whole(int length)
    {
        var path = Path.Combine(Directory.CreateTempSubdirectory("bounded").FullName, "bytes");
        var bytes = new byte[length];
        Random.Shared.NextBytes(bytes);
        File.WriteAllBytes(path, bytes);

        Assert.Equal(bytes, BoundedFile.Read(path, 200_000));
        Assert.Equal(Math.Min(length, 501), BoundedFile.Read(path, 500).Length);
        Directory.Delete(Path.GetDirectoryName(path)!, recursive: true);
    }

    [Fact]
    public void A_device_without_an_end_is_read_one_byte_too_far()
    {
        Assert.SkipUnless(File.Exists("/dev/zero"), "there is no such device");
        Assert.Equal(100_001, BoundedFile.Read("/dev/zero", 100_000).Length);
    }
}
