using System.Reflection;
using System.Xml.Linq;
using CircuitTransient.Cli;
using CircuitTransient.Text;

namespace CircuitTransient.Tests.Project;

/// <summary>Every public type says what it is.</summary>
public class PublicTypeTests
{
    public static TheoryData<Assembly> Assemblies =>
        [typeof(SourceText).Assembly, typeof(App).Assembly];

    [Theory]
    [MemberData(nameof(Assemblies))]
    public void Every_public_type_has_a_summary(Assembly assembly)
    {
        var documented = XDocument.Load(Path.ChangeExtension(assembly.Location, ".xml"))
            .Descendants("member")
            .Where(member => !string.IsNullOrWhiteSpace((string?)member.Element("summary")))
            .Select(member => (string?)member.Attribute("name"))
            .ToHashSet();
        var types = assembly.GetExportedTypes();

        Assert.NotEmpty(types);
        Assert.Empty(types.Select(DocumentationName).Where(name => !documented.Contains(name)).ToList());
    }

    private static string DocumentationName(Type type) => $"T:{type.FullName!.Replace('+', '.')}";
}
