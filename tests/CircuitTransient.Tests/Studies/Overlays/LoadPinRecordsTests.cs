using CircuitTransient.Tests.Project;

namespace CircuitTransient.Tests.Studies.Overlays;

public class LoadPinRecordsTests
{
    [Fact]
    public void The_bare_record_beside_the_demonstration_circuits_is_the_seeded_one() =>
        Assert.Equal(LoadPinRecords.Bare(), Repository.Read("netlists/load-pin-bare.csv"));

    [Fact]
    public void The_loaded_record_beside_the_demonstration_circuits_is_the_seeded_one() =>
        Assert.Equal(LoadPinRecords.Loaded(), Repository.Read("netlists/load-pin-loaded.csv"));
}
